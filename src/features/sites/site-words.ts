import type { Role } from '../../contract/accounts.ts';
import type { Site, SiteFilter, SiteFlag, SiteSort } from '../../contract/sites.ts';
import { metres, withUnit } from '../../lib/format.ts';

export function mayChangeSites(role: Role): boolean {
  return role !== 'viewer';
}

/** Flags in a word or two, for the table. */
export const flagWord: Readonly<Record<SiteFlag, string>> = {
  far: 'Far',
  height: 'Height',
  'no station': 'No station',
  'station without years': 'No weather',
  sea: 'At sea',
  relief: 'Relief differs',
};

/** The same in a sentence, with what to do. */
export const flagMeaning: Readonly<Record<SiteFlag, string>> = {
  far: 'The station is over 100 km away: grade D, drawn hatched and not ranked.',
  height: 'Station and site differ by over 300 m in height: grade D, whatever the distance.',
  'no station': 'The team has no station with an accepted weather year yet.',
  'station without years': 'The chosen station has no accepted weather year any more. Choose another.',
  sea: 'The position lies in the sea, over 20 km from land. Are latitude and longitude swapped, or a sign lost?',
  relief: 'The height that was given is over 300 m from that of the relief. Check position and height.',
};

export const filterWord: Readonly<Record<SiteFilter, string>> = {
  'to settle': 'To settle',
  chosen: 'Station chosen',
  ...flagWord,
  far: 'Station far away',
  height: 'Height differs',
};

export const sortLabel: Readonly<Record<SiteSort, string>> = {
  letters: 'Site',
  name: 'Name',
  load: 'Design load',
  station: 'Station',
  distance: 'Distance',
  height: 'Height diff.',
  flags: 'Flags',
  score: 'Score',
  grade: 'Grade',
  verdict: 'Verdict',
  water: 'L/kWh',
  saved: 'Saved',
};

/** "about 240 m" where the relief gave it. */
export function elevationWords({ elevationM, elevationSource }: Pick<Site, 'elevationM' | 'elevationSource'>): string {
  if (elevationM === null) return 'not known';
  return elevationSource === 'relief' ? `about ${metres(elevationM)}` : metres(elevationM);
}

export function kilometres(value: number): string {
  return withUnit(value, 'km', value < 10 ? 1 : 0);
}

/** Station above the site positive, with its sign. */
export function heightDifference(valueM: number | null): string {
  if (valueM === null) return '–';
  return valueM > 0 ? `+${metres(valueM)}` : metres(valueM);
}

/** Latitude and longitude to five decimals, about a metre, as they can be typed again. */
export function exactPosition({ latitude, longitude }: { latitude: number; longitude: number }): string {
  return `${plainDegrees(latitude)}, ${plainDegrees(longitude)}`;
}

function plainDegrees(value: number): string {
  return String(Math.round(value * 1e5) / 1e5);
}

export function loadWords(designLoadKw: number | null): string {
  return designLoadKw === null ? '–' : withUnit(designLoadKw, 'kW', Number.isInteger(designLoadKw) ? 0 : 1);
}
