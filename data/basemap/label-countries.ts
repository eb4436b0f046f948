import { countryLabel } from './country-names.ts';
import { areaOf, chordDegrees, interiorPoint } from './interior-point.ts';
import type { Country, PolygonRings, Position } from './read-atlas.ts';

export type CountryLabel = { readonly name: string; readonly position: Position; readonly rank: number };

/** Of a letter of a country's name as the style draws it, space between letters included. */
const LETTER_WIDTH_PX = 8.5;
/** MapLibre draws the whole world 512 px wide at zoom 0. */
const WORLD_WIDTH_PX = 512;
/** Names longer than this are broken into lines. */
const LINE_LETTERS = 14;
const LARGEST_RANK = 6;

/**
 * One label per country, on its largest piece of land. The rank is the zoom from which the name fits between the borders
 * to its left and right; small countries come last, and then lie over their neighbours or the sea.
 */
export function labelCountries(countries: readonly Country[]): CountryLabel[] {
  return countries.flatMap((country) => {
    const name = countryLabel(country.name);
    const largest = largestOf(country.polygons);
    if (name === null || largest === null) return [];
    const point = interiorPoint(largest);
    const position: Position = [point[0] > 180 ? point[0] - 360 : point[0], point[1]];
    return [{ name, position, rank: fittingZoom(name, chordDegrees(largest, point)) }];
  });
}

function largestOf(polygons: readonly PolygonRings[]): PolygonRings | null {
  let largest: PolygonRings | null = null;
  let largestArea = 0;
  for (const polygon of polygons) {
    const area = areaOf(polygon[0] ?? []);
    if (area > largestArea) [largest, largestArea] = [polygon, area];
  }
  return largest;
}

function fittingZoom(name: string, roomDegrees: number): number {
  const longestWord = Math.max(...name.split(' ').map((word) => word.length));
  const letters = name.length <= LINE_LETTERS ? name.length : Math.max(longestWord, Math.ceil(name.length / 2) + 1);
  const zoom = Math.log2((letters * LETTER_WIDTH_PX * 360) / (roomDegrees * WORLD_WIDTH_PX));
  return Math.min(LARGEST_RANK, Math.max(1, Math.ceil(zoom)));
}
