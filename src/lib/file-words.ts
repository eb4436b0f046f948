/** Words of weather files that several features print. */
import type { Role } from '../contract/accounts.ts';
import type { FileStatus, WeatherFile } from '../contract/weather.ts';

/** Weather files and stations are the engineers' to change; everyone else reads what they say. */
export function mayChangeWeather(role: Role): boolean {
  return role === 'engineer' || role === 'lead';
}

export const statusWord: Readonly<Record<FileStatus, string>> = {
  reading: 'Reading',
  asks: 'Asks',
  review: 'In review',
  accepted: 'Accepted',
  refused: 'Refused',
  withdrawn: 'Withdrawn',
  superseded: 'Superseded',
};

export function yearWords({ kind, year }: Pick<WeatherFile, 'kind' | 'year'>): string {
  if (kind === 'typical') return 'Typical year';
  if (kind === 'derived') return 'Derived year';
  return kind === 'actual' && year !== null ? String(year) : '–';
}
