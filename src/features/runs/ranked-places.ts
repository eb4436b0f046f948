import type { MapPlace } from './map-places.ts';

export interface RankedPlace {
  readonly place: MapPlace;
  /** Equal scores share a rank; null without a score and for grade D, which is not ranked. */
  readonly rank: number | null;
}

/** Places by score, highest first, equal ones by name; then grade D by score; then those without a score by name. */
export function rankedPlaces(places: readonly MapPlace[]): RankedPlace[] {
  const named = orderedByName(places);
  // Sorting keeps the order of equals: places of one score stay by name.
  const byScore = (a: MapPlace, b: MapPlace) => (b.score ?? 0) - (a.score ?? 0);
  const ranked = named.filter(({ score, grade }) => score !== null && grade !== 'D').sort(byScore);
  const doubtful = named.filter(({ score, grade }) => score !== null && grade === 'D').sort(byScore);
  const unscored = named.filter(({ score }) => score === null);
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
let lastOrder: { readonly names: readonly string[]; readonly order: readonly number[] } = { names: [], order: [] };

/** The order of names is kept from one time to the next: under a slider scores change, names do not. */
function orderedByName(places: readonly MapPlace[]): MapPlace[] {
  const { names, order } = lastOrder;
  const isSame =
    names.length === 2 * places.length &&
    places.every(({ id, name }, index) => names[2 * index] === id && names[2 * index + 1] === name);
  const found = isSame ? order : orderOfNames(places);
  if (!isSame) lastOrder = { names: places.flatMap(({ id, name }) => [id, name]), order: found };
  return found.flatMap((index) => places[index] ?? []);
}

function orderOfNames(places: readonly MapPlace[]): readonly number[] {
  const compare = (a: MapPlace | undefined, b: MapPlace | undefined) =>
    collator.compare(a?.name ?? '', b?.name ?? '') || ((a?.id ?? '') < (b?.id ?? '') ? -1 : 1);
  return places.map((_, index) => index).sort((one, other) => compare(places[one], places[other]));
}

/** Places whose name or letters hold every word typed, whatever its case and accents. */
export function filterByName(places: readonly RankedPlace[], typed: string): readonly RankedPlace[] {
  const words = plain(typed).split(/\s+/).filter(Boolean);
  if (words.length === 0) return places;
  return places.filter(({ place }) => {
    const name = plain(place.name);
    return words.every((word) => name.includes(word) || place.letters === word);
  });
}

/** The first so many, and after them the chosen one where it stands further down: a list of thousands costs what is read of it. */
export function firstOfRanked(
  places: readonly RankedPlace[],
  { count, chosenId }: { readonly count: number; readonly chosenId: string | null },
): readonly RankedPlace[] {
  const chosen = places.findIndex(({ place }) => place.id === chosenId);
  return [...places.slice(0, count), ...(chosen >= count ? places.slice(chosen, chosen + 1) : [])];
}

function plain(text: string): string {
  return text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();
}
