import { type ReactNode, Suspense, useState } from 'react';
import { Loading } from '../../ui/loading.tsx';

interface FoldProps {
  readonly title: string;
  /** What can be read without opening it. */
  readonly gist?: string;
  readonly isOpenFirst?: boolean;
  /** Rendered once it is open: what is asked of the server is asked then. */
  readonly children: () => ReactNode;
}

/** A part of a long panel that stays folded until it is wanted. */
export function Fold({ title, gist, isOpenFirst = false, children }: FoldProps) {
  const [isOpen, setOpen] = useState(isOpenFirst);
  return (
    <details
      open={isOpen}
      onToggle={({ currentTarget }) => setOpen(currentTarget.open)}
      className="group border-t border-line"
    >
      <summary className="flex cursor-pointer list-none items-baseline gap-x-2 py-2 max-sm:flex-wrap [&::-webkit-details-marker]:hidden">
        <span aria-hidden="true" className="inline-block w-3 text-soft transition-transform group-open:rotate-90">
          ›
        </span>
        <h2 className="text-name">{title}</h2>
        {gist === undefined ? null : <span className="text-soft max-sm:basis-full max-sm:pl-5">{gist}</span>}
      </summary>
      {isOpen ? (
        <div className="pb-4 pl-5 max-sm:pl-0">
          <Suspense fallback={<Loading what={title.toLowerCase()} />}>{children()}</Suspense>
        </div>
      ) : null}
    </details>
  );
}
