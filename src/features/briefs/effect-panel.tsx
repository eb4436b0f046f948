import { useId } from 'react';
import { ClassSwatch } from '../../charts/class-swatch.tsx';
import { classWords } from '../../charts/hour-class-words.ts';
import { barOrder, LedgerBar } from '../../charts/ledger-bar.tsx';
import type { BriefPreview } from '../../contract/briefs.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { hours, number, share } from '../../lib/format.ts';
import { changeWords, exampleYearWords, previewVerdict } from './brief-words.ts';
import type { DraftEffect } from './use-effect-of-draft.ts';

interface EffectPanelProps {
  readonly stations: readonly { id: string; name: string }[];
  readonly savedVersion: number;
  readonly effect: DraftEffect;
  readonly hasFaults: boolean;
}

/** What the draft makes of one example year, beside the form that changes it. */
export function EffectPanel({ stations, savedVersion, effect, hasFaults }: EffectPanelProps) {
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
    <section aria-label="Effect of the draft" aria-busy={isStale} className="grid gap-2">
      <div className="flex flex-wrap items-center gap-x-2">
        <label htmlFor={id} className="text-fine text-soft">
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
      {hasFaults ? (
        <p role="status" className="font-medium text-madder">
          The draft has faults, said beside its fields. Until they are mended the effect is that of its last state
          without one.
        </p>
      ) : null}
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
      </p>
      <LedgerBar
        id={`now${id}`}
        classes={now.ledger.classes}
        demand={now.ledger.demand}
        label={barLabel(now, 'draft')}
      />
      {before === undefined ? null : (
        <div className="opacity-75">
          <LedgerBar
            id={`before${id}`}
            classes={before.ledger.classes}
            demand={before.ledger.demand}
            heightPx={8}
            label={barLabel(before, `saved version ${savedVersion}`)}
          />
        </div>
      )}
      <p>
        {previewVerdict(now)}
        {before !== undefined && before.verdict !== now.verdict ? ` Version ${savedVersion}: ${before.verdict}.` : ''}
      </p>
      <div className="max-lg:hidden">
        <ClassTable now={now} before={before} savedVersion={savedVersion} />
      </div>
    </>
  );
}

function ClassTable({ now, before, savedVersion }: EffectProps) {
  const id = useId();
  const classes = barOrder.filter((each) => now.ledger.classes[each] > 0 || (before?.ledger.classes[each] ?? 0) > 0);
  return (
    <table className="w-full">
      <caption className="sr-only">Hours with demand by class, and the change from version {savedVersion}</caption>
      <thead className="text-fine text-soft">
        <tr>
          <th scope="col" className="text-left font-normal">
            {number(now.ledger.demand)} hours with demand
          </th>
          <th scope="col" className="pl-2 text-right font-normal">
            Hours
          </th>
          <th scope="col" className="pl-2 text-right font-normal">
            Change
          </th>
        </tr>
      </thead>
      <tbody>
        {classes.map((each) => (
          <tr key={each}>
            <th scope="row" className="py-px text-left font-normal">
              <span className="flex items-center gap-2">
                <ClassSwatch hourClass={each} id={`${id}-${each}`} />
                {classWords[each]}
              </span>
            </th>
            <td className="pl-2 text-right whitespace-nowrap">{hours(now.ledger.classes[each])}</td>
            <td className="pl-2 text-right whitespace-nowrap text-soft">
              {before === undefined ? '' : changeWords(now.ledger.classes[each] - before.ledger.classes[each], 'h')}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function scoreChange(now: BriefPreview, before: BriefPreview, version: number): string {
  if (now.score === null || before.score === null) {
    return before.score === now.score ? `as in version ${version}` : `version ${version} had ${before.score ?? 'none'}`;
  }
  const change = changeWords(now.score - before.score);
  return change === 'the same' ? `the same as version ${version}` : `${change} against version ${version}`;
}

function barLabel({ ledger }: BriefPreview, whose: string): string {
  if (ledger.demand === 0) return `Under the ${whose} no hour has demand.`;
  const met = share((100 * ledger.met) / ledger.demand);
  return `Under the ${whose} ${met} of ${number(ledger.demand)} hours with demand are met.`;
}
