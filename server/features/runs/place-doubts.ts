import type { PlaceRange, TurningChange, WhatWouldPass } from '#contract/place-doubts.ts';
import type { Brief } from '#engine/brief/brief.ts';
import { type TurningLever, turningLevers } from '#engine/score/turning-levers.ts';
import { AppError } from '../../http/app-error.ts';
import type { WebThreads } from '../../jobs/web-threads.ts';
import type { PlaceToJudge } from './place-to-judge.ts';

interface Doubting {
  readonly threads: Pick<WebThreads, 'range' | 'turning'>;
  readonly brief: Brief;
  readonly place: PlaceToJudge;
  readonly signal: AbortSignal;
}

/** @throws AppError wrong_state without a usable year */
export async function judgePlaceRange({ threads, brief, place, signal }: Doubting): Promise<PlaceRange> {
  const judged = await threads.range({ brief, ...place }, signal);
  if (judged === null) throw new AppError('wrong_state', 'No weather year of this place can be used for the brief.');
  const { year, years, range, pairs, scoreExact } = judged;
  const presented = pairs.map(({ doubt, minus, plus }) => ({
    doubt,
    minus: { label: minus.label, score: whole(minus.scoreExact) },
    plus: { label: plus.label, score: whole(plus.scoreExact) },
  }));
  return {
    score: whole(scoreExact),
    year,
    years: range === null ? null : { ...range, scores: years.flatMap(measured) },
    pairs: presented,
    largest: largestOf([
      ...(range === null ? [] : [{ doubt: 'years' as const, spread: range.high - range.low }]),
      ...pairs.flatMap(({ doubt, minus, plus }) =>
        minus.scoreExact === null || plus.scoreExact === null
          ? []
          : [{ doubt, spread: Math.abs(plus.scoreExact - minus.scoreExact) }],
      ),
    ]),
  };
}

function whole(score: number | null): number | null {
  return score === null ? null : Math.round(score);
}

type YearScore = NonNullable<PlaceRange['years']>['scores'][number];

function measured({
  kind,
  year,
  score,
}: {
  kind: YearScore['kind'] | 'derived';
  year: number | null;
  score: number | null;
}) {
  return kind === 'derived' ? [] : [{ kind, year, score }];
}

function largestOf(
  spreads: readonly { readonly doubt: NonNullable<PlaceRange['largest']>; readonly spread: number }[],
): PlaceRange['largest'] {
  return spreads.toSorted((one, other) => other.spread - one.spread)[0]?.doubt ?? null;
}

/** Each lever is a task of its own, so that whoever goes away stops the others. */
export async function whatWouldPass({ threads, brief, place, signal }: Doubting): Promise<WhatWouldPass> {
  const { station } = place;
  const levers = turningLevers(brief);
  const { verdict, failed } = await threads.turning({ brief, station, lever: null }, signal);
  const known = { verdict, failed: [...failed], bounds: levers.map(boundOf) };
  if (verdict !== 'does not') return { ...known, changes: [], bounds: [], note: nothingToTurn(verdict) };
  const turned = await Promise.all(
    levers.map(async (lever, at) => {
      const found = await threads.turning({ brief, station, lever: at }, signal);
      return found.turning === null ? [] : [changeOf(lever, { value: found.turning.value, score: found.score })];
    }),
  );
  const changes = turned.flat().toSorted(bySize);
  return {
    ...known,
    changes,
    note: changes.length > 0 ? null : 'No single change within these bounds turns the verdict.',
  };
}

function nothingToTurn(verdict: WhatWouldPass['verdict']): string {
  if (verdict === 'meets the brief') return 'It meets the brief as it is.';
  return verdict === null ? 'No weather year can be used for the brief.' : 'The brief sets no tolerance to pass.';
}

function changeOf(lever: TurningLever, to: { value: number | null; score: number | null }): TurningChange {
  const { from, width, path, label, unit, stage } = lever;
  const size = from === null || width === null || to.value === null ? null : Math.abs(to.value - from) / width;
  return { lever: lever.lever, path, label, from, to: to.value, unit, stage, size, score: to.score };
}

/** The least first; a stage, which has no size, last. */
function bySize(one: TurningChange, other: TurningChange): number {
  return (one.size ?? Number.MAX_VALUE) - (other.size ?? Number.MAX_VALUE);
}

/** "Set-point up to 31 °C", "Indirect stage added". */
function boundOf({ label, unit, values, stage }: TurningLever): string {
  return stage === null ? `${label} up to ${values.at(-1)}${unit === '' ? '' : ` ${unit}`}` : `${label} added`;
}
