import { useId } from 'react';
import { LedgerBar } from '../../charts/ledger-bar.tsx';
import type { BriefPreview } from '../../contract/briefs.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { number, share } from '../../lib/format.ts';
import { exampleYearWords, signed, verdictWords } from './brief-words.ts';
import type { DraftEffect } from './use-effect-of-draft.ts';

interface EffectPanelProps {
  readonly stations: readonly { id: string; name: string }[];
  readonly savedVersion: number;
  readonly effect: DraftEffect;
}

/** What the draft makes of one example year, beside the form that changes it: score, hours and verdict. */
export function EffectPanel({ stations, savedVersion, effect }: EffectPanelProps) {
  const { stationId, setStation, isStale, now, before, error } = effect;
  const id = useId();
  if (stationId === null) {
    return (
      <section aria-label="Effect of the draft">
        <p className="text-soft">The effect shows here once a station with accepted weather is there to try it on.</p>
      </section>
    );
  }
  return (
    <section aria-label="Effect of the draft" aria-busy={isStale} className="grid gap-1.5">
      <div className="flex flex-wrap items-center gap-x-2">
        <label htmlFor={id} className="text-fine text-soft max-lg:sr-only">
          Effect at
        </label>
        <select
          id={id}
          value={stationId}
          onChange={({ currentTarget }) => setStation(currentTarget.value)}
          className="min-h-8 min-w-0 max-w-full rounded-md border border-[#918a78] bg-paper px-2"
        >
          {stations.map((station) => (
            <option key={station.id} value={station.id}>
              {station.name}
            </option>
          ))}
        </select>
        {now === undefined ? null : <span className="text-fine text-soft">{exampleYearWords(now)}</span>}
      </div>
      {error === null ? null : (
        <p role="alert" className="font-medium text-madder">
          {errorSentence(error)}
        </p>
      )}
      {now === undefined ? null : <Effect now={now} before={before} savedVersion={savedVersion} />}
    </section>
  );
}

interface EffectProps {
  readonly now: BriefPreview;
  readonly before: BriefPreview | undefined;
  readonly savedVersion: number;
}

function Effect({ now, before, savedVersion }: EffectProps) {
  const id = useId();
  return (
    <>
      <p className="flex flex-wrap items-baseline gap-x-3">
        <span className="serif text-title" data-effect-score>
          {now.score ?? 'No score'}
        </span>
        <span className="text-soft">
          {now.score === null ? now.scoreNote : 'of 100'}
          {before === undefined ? '' : `, ${scoreChange(now, before, savedVersion)}`}
        </span>
        <span>
          {verdictWords(now.verdict)}
          {before !== undefined && before.verdict !== now.verdict
            ? `; version ${savedVersion}: ${verdictWords(before.verdict).toLowerCase()}`
            : ''}
          .
        </span>
      </p>
      <LedgerBar
        id={`now${id}`}
        classes={now.ledger.classes}
        demand={now.ledger.demand}
        label={barLabel(now, 'draft')}
      />
      {before === undefined ? null : (
        <div className="opacity-75 max-lg:hidden">
          <LedgerBar
            id={`before${id}`}
            classes={before.ledger.classes}
            demand={before.ledger.demand}
            heightPx={8}
            label={barLabel(before, `saved version ${savedVersion}`)}
          />
        </div>
      )}
    </>
  );
}

function scoreChange(now: BriefPreview, before: BriefPreview, version: number): string {
  if (now.score === null || before.score === null) {
    return before.score === now.score ? `as in version ${version}` : `version ${version} had ${before.score ?? 'none'}`;
  }
  const change = now.score - before.score;
  return change === 0 ? `the same as version ${version}` : `${signed(change)} against version ${version}`;
}

function barLabel({ ledger }: BriefPreview, whose: string): string {
  if (ledger.demand === 0) return `Under the ${whose} no hour has demand.`;
  const met = share((100 * ledger.met) / ledger.demand);
  return `Under the ${whose} ${met} of ${number(ledger.demand)} hours with demand are met.`;
}
