import type { MapPlace } from './map-places.ts';

export interface RankedPlace {
  readonly place: MapPlace;
  /** Equal scores share a rank; null without a score and for grade D, which is not ranked. */
  readonly rank: number | null;
}

/** Places by score, highest first, equal ones by name; then grade D by score; then those without a score by name. */
export function rankedPlaces(places: readonly MapPlace[]): RankedPlace[] {
  const byName = (a: MapPlace, b: MapPlace) => collator.compare(a.name, b.name) || (a.id < b.id ? -1 : 1);
  const byScore = (a: MapPlace, b: MapPlace) => (b.score ?? 0) - (a.score ?? 0) || byName(a, b);
  const ranked = places.filter(({ score, grade }) => score !== null && grade !== 'D').sort(byScore);
  const doubtful = places.filter(({ score, grade }) => score !== null && grade === 'D').sort(byScore);
  const unscored = places.filter(({ score }) => score === null).sort(byName);
  let rank = 0;
  return [
    ...ranked.map((place, index) => {
      if (place.score !== ranked[index - 1]?.score) rank = index + 1;
      return { place, rank };
    }),
    ...[...doubtful, ...unscored].map((place) => ({ place, rank: null })),
  ];
}

/** One for all: ten thousand names are compared many times over. */
const collator = new Intl.Collator('en');

/** Places whose name or letters hold every word typed, whatever its case and accents. */
export function filterByName(places: readonly RankedPlace[], typed: string): readonly RankedPlace[] {
  const words = plain(typed).split(/\s+/).filter(Boolean);
  if (words.length === 0) return places;
  return places.filter(({ place }) => {
    const name = plain(place.name);
    return words.every((word) => name.includes(word) || place.letters === word);
  });
}

function plain(text: string): string {
  return text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();
}
