import { Fragment } from 'react';

const MARK = /([_^])\{([^}]*)\}/;

/** A formula or sentence in which `_{…}` lowers what it holds and `^{…}` raises it. */
export function MarkedText({ children }: { children: string }) {
  const [before = '', mark, held, after = ''] = splitAtMark(children);
  if (mark === undefined) return before;
  const Raised = mark === '_' ? 'sub' : 'sup';
  return (
    <Fragment>
      {before}
      <Raised className="text-[0.75em] leading-none">{held}</Raised>
      <MarkedText>{after}</MarkedText>
    </Fragment>
  );
}

/** The text before the first mark, the mark, what it holds, and the rest; without a mark the text alone. */
function splitAtMark(text: string): readonly (string | undefined)[] {
  const found = MARK.exec(text);
  if (found === null) return [text];
  const [whole, mark, held] = found;
  return [text.slice(0, found.index), mark, held, text.slice(found.index + whole.length)];
}
