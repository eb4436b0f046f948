import type { MapStation } from '../../contract/programme-map.ts';

export interface RankedStation {
  readonly station: MapStation;
  /** Equal scores share a rank; null without a score and for grade D, which is not ranked. */
  readonly rank: number | null;
}

/** Stations by score, highest first, equal ones by name; then grade D by score; then those without a score by name. */
export function rankedStations(stations: readonly MapStation[]): RankedStation[] {
  const byName = (a: MapStation, b: MapStation) => a.name.localeCompare(b.name, 'en') || a.id.localeCompare(b.id);
  const byScore = (a: MapStation, b: MapStation) => (b.score ?? 0) - (a.score ?? 0) || byName(a, b);
  const isRanked = ({ score, grade }: MapStation) => score !== null && grade !== 'D';
  const ranked = stations.filter(isRanked).sort(byScore);
  const doubtful = stations.filter(({ score, grade }) => score !== null && grade === 'D').sort(byScore);
  const unscored = stations.filter(({ score }) => score === null).sort(byName);
  return [
    ...ranked.map((station) => ({
      station,
      rank: 1 + ranked.findIndex(({ score }) => score === station.score),
    })),
    ...[...doubtful, ...unscored].map((station) => ({ station, rank: null })),
  ];
}

/** Stations whose name holds every word typed, whatever its case and accents. */
export function filterByName(stations: readonly RankedStation[], typed: string): RankedStation[] {
  const words = plain(typed).split(/\s+/).filter(Boolean);
  return stations.filter(({ station }) => words.every((word) => plain(station.name).includes(word)));
}

function plain(text: string): string {
  return text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();
}
