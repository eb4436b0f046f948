import { type ReactNode, useId } from 'react';

/** One part of the account page, under its own heading. */
export function AccountSection({ title, intro, children }: { title: string; intro?: string; children: ReactNode }) {
  const id = useId();
  return (
    <section aria-labelledby={id} className="border-t border-line pt-5">
      <h2 id={id} className="text-name">
        {title}
      </h2>
      {intro ? <p className="mt-1 max-w-[65ch] text-soft">{intro}</p> : null}
      <div className="mt-3 grid max-w-[34rem] gap-4">{children}</div>
    </section>
  );
}
