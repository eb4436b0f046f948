import type { ReactNode } from 'react';
import type { ProgrammeMap } from '../../contract/programme-map.ts';
import { plural, sentence } from '../../lib/format.ts';

/** The programme and the brief that every number of the sheet rests on; `choice` is where another one is taken. */
export function BriefNote({ map, choice }: { map: ProgrammeMap; choice: ReactNode }) {
  return (
    <header>
      <p className="text-fine text-soft">{map.programme.name}</p>
      <h1 className="text-name">{map.brief.name}</h1>
      <p className="mt-1">
        <span className="text-soft">Brief version {map.brief.version}.</span> {sentence(map.brief.sentence)}
      </p>
      {choice}
      <p role="status" className="text-fine text-soft">
        {map.pending > 0
          ? `${plural(map.pending, 'weather year')} ${map.pending === 1 ? 'is' : 'are'} being tested; scores follow by themselves.`
          : ''}
      </p>
    </header>
  );
}
