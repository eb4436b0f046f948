import { Fragment } from 'react';

/** A formula or sentence in which `_{…}` lowers what it holds. */
export function MarkedText({ children }: { children: string }) {
  const parts = children.split(/_\{([^}]*)\}/);
  // Every second part stood in braces; a text never changes while it is shown.
  return parts.map((part, place) =>
    place % 2 === 1 ? (
      // biome-ignore lint/suspicious/noArrayIndexKey: the parts of one fixed text
      <sub key={place} className="text-[0.75em] leading-none">
        {part}
      </sub>
    ) : (
      // biome-ignore lint/suspicious/noArrayIndexKey: the parts of one fixed text
      <Fragment key={place}>{part}</Fragment>
    ),
  );
}
