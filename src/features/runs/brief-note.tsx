import type { ReactNode } from 'react';
import type { ProgrammeMap } from '../../contract/programme-map.ts';
import { plural, sentence } from '../../lib/format.ts';

/** The programme and the brief that every number of the sheet rests on; `choice` is where another one is taken. */
export function BriefNote({ map, choice }: { map: ProgrammeMap; choice: ReactNode }) {
  return (
    <header>
      <p className="text-fine text-soft">{map.programme.name}</p>
      <h1 className="text-name">{map.brief.name}</h1>
      <details className="group mt-0.5 text-fine">
        <summary className="cursor-pointer list-none text-soft [&::-webkit-details-marker]:hidden">
          <span aria-hidden="true" className="mr-1 inline-block transition-transform group-open:rotate-90">
            ›
          </span>
          Brief version {map.brief.version}.
        </summary>
        <p className="mt-0.5">{sentence(map.brief.sentence)}</p>
        {choice}
      </details>
      <p role="status" className="text-fine text-soft">
        {map.pending > 0
          ? `${plural(map.pending, 'weather year')} ${map.pending === 1 ? 'is' : 'are'} being tested; scores follow by themselves.`
          : ''}
      </p>
    </header>
  );
}
