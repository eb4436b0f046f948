import type { Role } from '../../contract/accounts.ts';
import type { Place } from '../../contract/place.ts';
import type { MapStation } from '../../contract/programme-map.ts';
import type { Ledger, ToleranceAnswer } from '../../contract/runs.ts';
import { list, number, sensible, share as shareOf } from '../../lib/format.ts';

type Shown = NonNullable<Place['shown']>;

const bandSentence: Readonly<Record<string, string>> = {
  most: 'Air and evaporation can carry most of the cooling.',
  much: 'Air and evaporation can carry much of the cooling.',
  some: 'Air and evaporation can carry some of the cooling.',
  little: 'Air and evaporation can carry little of the cooling.',
};

export function bandWords(words: string | null): string | null {
  return words === null ? null : (bandSentence[words] ?? null);
}

/** "Does not meet the brief: worst spell 61 h, 37 h over the 24 h allowed." */
export function verdictSentence({ verdict, tolerances }: Pick<Shown, 'verdict' | 'tolerances'>): string {
  if (verdict === 'no tolerance set') return 'The brief sets no tolerance, so there is no verdict.';
  if (verdict === 'meets the brief') return 'Meets the brief: every tolerance holds.';
  return `Does not meet the brief: ${list(tolerances.filter(({ holds }) => !holds).map(excessWords))}.`;
}

function excessWords({ tolerance, found, allowed, unit }: ToleranceAnswer): string {
  return `${tolerance} ${sensible(found, unit)}, ${sensible(found - allowed, unit === '%' ? 'points' : unit)} over the ${sensible(allowed, unit)} allowed`;
}

/** The columns that keep a grade from A, worst first. */
export function costingColumns(columns: Place['gradeColumns']): Place['gradeColumns'] {
  return columns.filter(({ grade }) => grade !== 'A').sort((a, b) => b.grade.localeCompare(a.grade));
}

/** "years C (one typical year), measured share B": the reason of those that set the grade, the rest is in the notes. */
export function costWords(costs: Place['gradeColumns'], overall: Place['grade']): string {
  return list(costs.map(({ column, grade, reason }) => `${column} ${grade}${grade === overall ? ` (${reason})` : ''}`));
}

export function sumOfClasses(ledger: Pick<Ledger, 'classes'>): number {
  return Object.values(ledger.classes).reduce((sum, count) => sum + count, 0);
}

/** Printed under every ledger; says plainly when the counts do not add up, which must never be hidden. */
export function identitySentence(ledger: Pick<Ledger, 'classes' | 'hours'>): string {
  const sum = sumOfClasses(ledger);
  if (sum === ledger.hours) return `The classes add up to ${number(sum)} hours.`;
  return `The classes add up to ${number(sum)} hours, the year has ${number(ledger.hours)}: do not use this ledger.`;
}

/** Share of the hours with demand that are met; null without demand. */
export function metWords(ledger: Pick<Ledger, 'demand' | 'met'>): string | null {
  return ledger.demand === 0 ? null : shareOf((100 * ledger.met) / ledger.demand);
}

/** What stands in place of a number. */
export function noScoreWords({ score, scoreNote }: Pick<MapStation, 'score' | 'scoreNote'>): string | null {
  if (score !== null) return null;
  const note = scoreNote ?? 'not judged yet';
  return note.charAt(0).toUpperCase() + note.slice(1);
}

/** Why a place shows no year at all. */
export function notJudgedWords({ years, derived }: Pick<Place, 'years' | 'derived'>): string {
  if (years.length > 0)
    return 'Not judged yet. Its year is being tested against the brief; the score follows by itself.';
  return derived.length > 0
    ? 'Not judged: only derived years stand here. The year that they were made of counts no longer.'
    : 'Not judged: no accepted weather year is usable for this brief.';
}

/** "72 to 83 over 9 years", "72 in each of 9 years"; null with fewer than two. */
export function rangeWords({ range, yearsCounted }: Pick<MapStation, 'range' | 'yearsCounted'>): string | null {
  if (range === null || yearsCounted < 2) return null;
  if (range.low === range.high) return `${range.low} in each of ${yearsCounted} years`;
  return `${range.low} to ${range.high} over ${yearsCounted} years`;
}

/** A site by its own name, a station by its. */
export function nameOfPlace({ site, station }: Pick<Place, 'site' | 'station'>): string {
  return (site ?? station).name;
}

export function placeYearWords({ kind, year }: Pick<Place['years'][number], 'kind' | 'year'>): string {
  if (kind === 'actual' && year !== null) return `the year ${year}`;
  return kind === 'derived' ? 'a derived year' : 'a typical year';
}

/** Results may be taken along by everyone but those who only look. */
export function mayExportRuns(role: Role): boolean {
  return role !== 'viewer';
}
