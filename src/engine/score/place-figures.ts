/**
 * The figures of a place from its runs under one brief version (method 7.5). A place score is derived, never stored: it
 * follows from the runs of the place's usable years.
 */
import type { Brief, ScoreComponent } from '../brief/brief.ts';
import { monthNames } from '../reduction/calendar.ts';
import type { YearKind } from '../reduction/weather-year.ts';
import type { RunResult, ScorePart, Verdict } from '../run/run-result.ts';
import { bandWord, type RawComponents, weightedScore } from './weighted-score.ts';

/** A run of the place with the year that it judged; callers may carry more, such as ids. */
export interface PlaceRun {
  readonly kind: YearKind;
  /** Calendar year of an actual year, else null. */
  readonly year: number | null;
  readonly result: Pick<RunResult, 'usable' | 'monthsShort' | 'gates' | 'parts' | 'verdict' | 'score' | 'scoreExact'>;
}

export interface PlaceFigures<Run extends PlaceRun> {
  /** What the figures are: of one year, or medians over actual years. */
  readonly basis: 'median over actual years' | 'typical year' | 'latest actual year' | 'no usable year';
  /** The runs that the figures rest on; actual years in order. */
  readonly runs: readonly Run[];
  /** The run whose ledger and year cloth stand for the place: the one year, or the one whose score is nearest. */
  readonly shown: Run | null;
  readonly parts: readonly ScorePart[];
  readonly score: number | null;
  readonly scoreNote: string | null;
  readonly scoreExact: number | null;
  readonly geometricMean: number | null;
  readonly words: string | null;
  /** `meets the brief` when every year that the figures rest on does. */
  readonly verdict: Verdict | null;
  /** "in n of N": years that meet the brief, of those that the figures rest on. */
  readonly yearsMeeting: number;
  /** Least and greatest printed score over usable actual years and the figures' own; null with fewer than two scores. */
  readonly range: { readonly low: number; readonly high: number } | null;
}

/** With so many usable actual years the figures are medians over them. */
const YEARS_FOR_MEDIAN = 5;

/**
 * @param input.runs the place's runs under `brief`, one per weather year, newest file first where kinds or years repeat;
 * derived years are left out, since they stand beside their parent and are never mixed with measured ones
 */
export function placeFigures<Run extends PlaceRun>(input: {
  brief: Pick<Brief, 'score' | 'limit'>;
  runs: readonly Run[];
}): PlaceFigures<Run> {
  const { brief } = input;
  const usable = input.runs.filter(({ kind, result }) => kind !== 'derived' && result.usable);
  const actual = usable
    .filter(({ kind }) => kind === 'actual')
    .toSorted((one, other) => (one.year ?? 0) - (other.year ?? 0));
  const { basis, runs } = chooseRuns(usable, actual);
  const weighted = weightedScore(brief.score, medianComponents(runs), {
    indexPoints: brief.limit.kind === 'thi' || brief.limit.kind === 'shade-heat',
  });
  const scoreNote = runs.length === 0 ? unusableNote(input.runs) : noteOf(runs, weighted.scoreExact);
  const score = scoreNote === null && weighted.scoreExact !== null ? Math.round(weighted.scoreExact) : null;
  return {
    basis,
    runs,
    shown: nearestRun(runs, weighted.scoreExact),
    ...weighted,
    score,
    scoreNote,
    words: score === null ? null : bandWord(score),
    verdict: verdictOver(runs),
    yearsMeeting: runs.filter(({ result }) => result.verdict === 'meets the brief').length,
    range: rangeOver([...new Set([...actual, ...runs])]),
  };
}

function chooseRuns<Run extends PlaceRun>(usable: readonly Run[], actual: readonly Run[]) {
  if (actual.length >= YEARS_FOR_MEDIAN) return { basis: 'median over actual years', runs: actual } as const;
  const typical = usable.find(({ kind }) => kind === 'typical');
  if (typical !== undefined) return { basis: 'typical year', runs: [typical] } as const;
  const latest = actual.at(-1);
  if (latest !== undefined) return { basis: 'latest actual year', runs: [latest] } as const;
  return { basis: 'no usable year', runs: [] } as const;
}

/** Each raw figure is the median over the runs, the worst year's the least. */
function medianComponents(runs: readonly PlaceRun[]): RawComponents {
  const worst = rawsOf(runs, 'worst-year');
  return {
    served: median(rawsOf(runs, 'served')),
    severity: median(rawsOf(runs, 'severity')),
    spell: median(rawsOf(runs, 'spell')),
    damp: median(rawsOf(runs, 'damp')),
    water: median(rawsOf(runs, 'water')),
    electricity: median(rawsOf(runs, 'electricity')),
    'worst-year': worst.length === 0 ? null : Math.min(...worst),
  };
}

function rawsOf(runs: readonly PlaceRun[], component: ScoreComponent): number[] {
  return runs.flatMap(({ result }) => result.parts.find((part) => part.component === component)?.raw ?? []);
}

/** The middle value, the mean of the two in the middle of an even number; null of none. */
function median(values: readonly number[]): number | null {
  const sorted = values.toSorted((one, other) => one - other);
  const upper = sorted[Math.floor(sorted.length / 2)];
  const lower = sorted[Math.ceil(sorted.length / 2) - 1];
  return upper === undefined || lower === undefined ? null : (lower + upper) / 2;
}

function noteOf(runs: readonly PlaceRun[], scoreExact: number | null): string | null {
  const failing = runs.flatMap(({ year, result }) =>
    result.gates
      .filter(({ answer }) => answer === 'fail')
      .map(({ note }) => (runs.length > 1 ? `${year}: ${note}` : note)),
  );
  if (failing.length > 0) return `excluded: ${failing.join('; ')}`;
  return scoreExact === null ? 'not applicable: no demand' : null;
}

function unusableNote(all: readonly PlaceRun[]): string {
  if (all.length > 0 && all.every(({ kind }) => kind === 'derived'))
    return 'not applicable: only derived years, whose measured year no longer counts';
  const short = all.find(({ result }) => !result.usable)?.result.monthsShort ?? [];
  const names = short.map((month) => monthNames[month - 1]).join(', ');
  const why = names === '' ? '' : `: less than 90 % of the hours of ${names}`;
  return `not applicable: no usable weather year${why}`;
}

function nearestRun<Run extends PlaceRun>(runs: readonly Run[], scoreExact: number | null): Run | null {
  let nearest: Run | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (const run of runs) {
    const distance = Math.abs((run.result.scoreExact ?? 0) - (scoreExact ?? 0));
    // Of equals the last.
    if (distance > least) continue;
    nearest = run;
    least = distance;
  }
  return nearest;
}

function verdictOver(runs: readonly PlaceRun[]): Verdict | null {
  const verdicts = runs.map(({ result }) => result.verdict);
  if (verdicts.length === 0) return null;
  if (verdicts.includes('does not')) return 'does not';
  return verdicts.includes('no tolerance set') ? 'no tolerance set' : 'meets the brief';
}

function rangeOver(runs: readonly PlaceRun[]): { low: number; high: number } | null {
  const scores = runs.flatMap(({ result }) => result.score ?? []);
  return scores.length < 2 ? null : { low: Math.min(...scores), high: Math.max(...scores) };
}
