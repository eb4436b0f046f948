import type { ReactNode } from 'react';
import { ListLayout, Virtualizer } from 'react-aria-components';

/** Puts only the rows in view of a list into the page; each is as high as said. */
export function LongList({ rowPx, children }: { rowPx: number; children: ReactNode }) {
  return (
    <Virtualizer layout={ListLayout} layoutOptions={{ rowHeight: rowPx }}>
      {children}
    </Virtualizer>
  );
}
