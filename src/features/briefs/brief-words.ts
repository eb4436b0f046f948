import type { Role } from '../../contract/accounts.ts';
import type { BriefPreview, BriefVersionView } from '../../contract/briefs.ts';
import type { FieldGroup, UseKind } from '../../engine/brief/brief-fields.ts';
import { number, plural, sensible } from '../../lib/format.ts';

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
    case 'gates':
      return 'Gates: questions for each site';
    case 'reported':
      return 'Reported beside the classes';
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

/** "+3", "−12", "0". */
export function signed(change: number, unit = ''): string {
  return `${change > 0 ? '+' : ''}${sensible(change, unit)}`;
}

/** "Does not meet the brief", for the line over the tolerances. */
export function verdictWords(verdict: BriefPreview['verdict']): string {
  if (verdict === 'no tolerance set') return 'No tolerance set, so no verdict';
  return verdict === 'meets the brief' ? 'Meets the brief' : 'Does not meet the brief';
}

export function exampleYearWords({ kind, year }: Pick<BriefPreview, 'kind' | 'year'>): string {
  if (kind === 'actual' && year !== null) return `the year ${year}`;
  return kind === 'derived' ? 'a derived year' : 'a typical year';
}
