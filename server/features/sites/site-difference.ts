import type { FieldChange, SiteFacts } from './site-store.ts';

/** What differs between two states of a site, field by field in words; `stationName` names a station by its id. */
export function siteDifference(
  was: SiteFacts,
  now: SiteFacts,
  stationName: (id: string) => string,
): readonly FieldChange[] {
  const words = (facts: SiteFacts): Readonly<Record<string, string>> => ({
    name: facts.name,
    position: `${facts.latitude}, ${facts.longitude}`,
    elevation: elevationWords(facts),
    'design load': facts.designLoadKw === null ? 'not known' : `${facts.designLoadKw} kW`,
    station: stationWords(facts, stationName),
    gates: facts.gates.map(({ gate, answer, note }) => `${gate}: ${answer}${note && ` (${note})`}`).join('; '),
    water: waterWords(facts),
    notes: facts.notes,
  });
  const [before, after] = [words(was), words(now)];
  return Object.keys(after).flatMap((field) => {
    const change = { field, was: before[field] ?? '', now: after[field] ?? '' };
    return change.was === change.now ? [] : [change];
  });
}

function elevationWords({ elevationM, elevationSource }: SiteFacts): string {
  if (elevationM === null) return 'not known';
  return elevationSource === 'relief' ? `about ${elevationM} m, from the relief` : `${elevationM} m`;
}

function stationWords({ stationId, stationReason }: SiteFacts, stationName: (id: string) => string): string {
  if (stationId === null) return 'the default';
  return stationReason === null ? stationName(stationId) : `${stationName(stationId)}: ${stationReason}`;
}

function waterWords({ water }: SiteFacts): string {
  return Object.entries(water)
    .filter(([, value]) => value !== null && value !== '')
    .map(([name, value]) => `${name} ${value}`)
    .sort()
    .join(', ');
}
