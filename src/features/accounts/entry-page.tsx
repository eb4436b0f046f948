import type { ReactNode } from 'react';
import { Wordmark } from '../../ui/wordmark.tsx';

interface EntryPageProps {
  readonly title: string;
  readonly intro: ReactNode;
  readonly children: ReactNode;
}

/** The sheet that a person without a session sees: name, what it is for, one form. */
export function EntryPage({ title, intro, children }: EntryPageProps) {
  return (
    <main className="mx-auto grid min-h-dvh w-full max-w-[26rem] content-center px-5 py-10">
      <div className="border border-ink p-[3px]">
        <div className="border border-ink bg-paper px-7 pt-7 pb-8 max-sm:px-5">
          <Wordmark large />
          <p className="mt-2 mb-6 text-body text-soft">{intro}</p>
          <h1 className="mb-4 text-name">{title}</h1>
          {children}
        </div>
      </div>
    </main>
  );
}
