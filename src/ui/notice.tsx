import type { ReactNode } from 'react';

export type NoticeTone = 'note' | 'attention' | 'wrong';

const edges: Readonly<Record<NoticeTone, string>> = {
  note: 'border-indigo',
  attention: 'border-weld',
  wrong: 'border-madder',
};

interface NoticeProps {
  readonly tone?: NoticeTone;
  readonly title?: string;
  readonly children?: ReactNode;
  /** What can be done about it. */
  readonly actions?: ReactNode;
  /** Read out when it appears; for the answer to something just done. */
  readonly live?: boolean;
}

/** Something to know, with a coloured edge and what can be done about it. The words carry the meaning, not the edge. */
export function Notice({ tone = 'note', title, children, actions, live = false }: NoticeProps) {
  return (
    <div
      role={live ? (tone === 'wrong' ? 'alert' : 'status') : undefined}
      className={`border-l-3 pl-3.5 py-1 ${edges[tone]}`}
    >
      {title ? <p className="font-semibold">{title}</p> : null}
      {children ? <div className="max-w-[70ch] text-body">{children}</div> : null}
      {actions ? <div className="mt-2 flex flex-wrap gap-2">{actions}</div> : null}
    </div>
  );
}
