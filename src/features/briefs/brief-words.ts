import type { Role } from '../../contract/accounts.ts';
import type { BriefPreview, BriefVersionView } from '../../contract/briefs.ts';
import type { FieldGroup, UseKind } from '../../engine/brief/brief-fields.ts';
import { list, number, plural, sensible } from '../../lib/format.ts';

export function mayChangeBriefs(role: Role): boolean {
  return role !== 'viewer';
}

/** The groups of the form in their order, each with the words of its use. */
export function groupTitle(group: FieldGroup, use: UseKind): string {
  switch (group) {
    case 'limit':
      return use === 'tower' ? 'Process limit' : use === 'turbine' ? 'Inlet limit' : 'Limit and load';
    case 'caps':
      return use === 'hall' ? 'Humidity caps, to be held by the hall’s own control' : 'Humidity caps';
    case 'air':
      return use === 'tower' ? 'Tower' : 'Air and stages';
    case 'plant':
      return 'Plant';
    case 'schedule':
      return 'Schedule';
    case 'water':
      return 'Water';
    case 'reference':
      return 'Reference plant';
    case 'prices':
      return 'Prices and grid';
    case 'tolerance':
      return 'Tolerances';
    case 'score':
      return 'Score weights and anchors';
  }
}

/** "12 stations judged, 3 to come". */
export function usedWords({ stationsJudged, stationsPending }: BriefVersionView): string {
  if (stationsJudged === 0 && stationsPending === 0) return 'no station judged';
  const pending = stationsPending > 0 ? `, ${number(stationsPending)} to come` : '';
  return `${plural(stationsJudged, 'station')} judged${pending}`;
}

/** "+3", "−12", "the same". */
export function changeWords(change: number, unit = ''): string {
  if (change === 0) return 'the same';
  return `${change > 0 ? '+' : ''}${sensible(change, unit)}`;
}

export function exampleYearWords({ kind, year }: Pick<BriefPreview, 'kind' | 'year'>): string {
  if (kind === 'actual' && year !== null) return `the year ${year}`;
  return kind === 'derived' ? 'a derived year' : 'a typical year';
}

/** The verdict on the example year, with what fails. */
export function previewVerdict({ verdict, tolerances }: Pick<BriefPreview, 'verdict' | 'tolerances'>): string {
  if (verdict === 'no tolerance set') return 'The draft sets no tolerance, so there is no verdict.';
  if (verdict === 'meets the brief') return 'Meets the brief: every tolerance holds.';
  const failing = tolerances.filter(({ holds }) => !holds);
  return `Does not meet the brief: ${list(
    failing.map(
      ({ tolerance, found, allowed, unit }) =>
        `${tolerance} ${sensible(found, unit)}, ${sensible(allowed, unit)} allowed`,
    ),
  )}.`;
}
