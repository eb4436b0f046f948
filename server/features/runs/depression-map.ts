import type { Knex } from 'knex';
import { listYearDepressions, type YearDepression } from './depression-read-model.ts';

const ALL_MONTHS = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12];
/** As many as make a place's figures medians (method 7.5). */
const YEARS_FOR_MEDIAN = 5;

export interface DepressionAsked {
  readonly teamId: string;
  readonly atLeastK: number;
  /** Month numbers with commas. */
  readonly months?: string | undefined;
}

/** Hours of every station with at least so much depression, over the years that method 7.5 would take. */
export async function depressionMap(db: Knex, { teamId, atLeastK, months: named }: DepressionAsked) {
  const months = named === undefined ? ALL_MONTHS : [...new Set(named.split(',').map(Number))].sort((a, b) => a - b);
  const years = await listYearDepressions(db, { teamId, atLeastK, months });
  const byStation = new Map<string, YearDepression[]>();
  for (const year of years) byStation.set(year.stationId, [...(byStation.get(year.stationId) ?? []), year]);
  const stations = [...byStation].map(([stationId, own]) => ({ stationId, ...depressionOf(own) }));
  return { atLeastK, months, stations };
}

function depressionOf(years: readonly YearDepression[]) {
  const chosen = chooseYears(years);
  return {
    hours: median(chosen.map(({ hours }) => hours)),
    knownHours: median(chosen.map(({ knownHours }) => knownHours)),
    years: chosen.length,
  };
}

function chooseYears(years: readonly YearDepression[]): readonly YearDepression[] {
  const actual = years.filter(({ kind }) => kind === 'actual');
  if (actual.length >= YEARS_FOR_MEDIAN) return actual;
  const typical = years.find(({ kind }) => kind === 'typical');
  if (typical !== undefined) return [typical];
  const [latest] = actual.toSorted((one, other) => (other.year ?? 0) - (one.year ?? 0));
  return latest === undefined ? [] : [latest];
}

/** The middle value, the mean of the two in the middle of an even number; null of none. */
function median(values: readonly number[]): number | null {
  const sorted = values.toSorted((one, other) => one - other);
  const upper = sorted[Math.floor(sorted.length / 2)];
  const lower = sorted[Math.ceil(sorted.length / 2) - 1];
  return upper === undefined || lower === undefined ? null : (lower + upper) / 2;
}
