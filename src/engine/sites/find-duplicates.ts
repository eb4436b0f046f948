/** Sites that are probably the same one twice: of the same name, or within a few metres of each other. */
import { greatCircleKm, type Position } from '../interpolation/great-circle-km.ts';

export interface NamedPlace extends Position {
  readonly name: string;
}

export interface Duplicate {
  /** Position in the list of those looked at. */
  readonly index: number;
  readonly by: 'name' | 'place';
  /** What it doubles: one further up in the same list, or one that was there before. */
  readonly of: { readonly kind: 'row' | 'standing'; readonly index: number };
}

/** A phone's fix and a rounded fifth decimal lie within this. */
export const SAME_PLACE_M = 10;
/** Side of a cell, degrees of latitude: 11 m, so that what lies within 10 m is in the same cell or beside it. */
const CELL_DEG = 1e-4;
const M_PER_KM = 1000;

/**
 * Each place that doubles another, once, by its name first.
 * @param standing those that were there before; they come before all of `places`
 */
export function findDuplicates(places: readonly NamedPlace[], standing: readonly NamedPlace[] = []): Duplicate[] {
  const byName = new Map<string, Duplicate['of']>();
  const byCell = new Map<string, { place: NamedPlace; of: Duplicate['of'] }[]>();
  const found: Duplicate[] = [];
  const take = (place: NamedPlace, own: Duplicate['of']): void => {
    const name = plainName(place.name);
    const named = byName.get(name);
    const near = named === undefined ? nearIn(byCell, place) : undefined;
    if (named === undefined) byName.set(name, own);
    // Those that double a place are not kept beside it: a thousand at one position would else be compared with each other.
    if (near === undefined && named === undefined) keepIn(byCell, place, own);
    if (own.kind === 'standing') return;
    if (named !== undefined) found.push({ index: own.index, by: 'name', of: named });
    else if (near !== undefined) found.push({ index: own.index, by: 'place', of: near });
  };
  for (const [index, place] of standing.entries()) take(place, { kind: 'standing', index });
  for (const [index, place] of places.entries()) take(place, { kind: 'row', index });
  return found;
}

function plainName(name: string): string {
  return name.normalize('NFC').toLowerCase().replace(/\s+/g, ' ').trim();
}

function cellOf(latitude: number, longitude: number): { row: number; column: number } {
  const row = Math.floor(latitude / CELL_DEG);
  return { row, column: columnIn(row, longitude) };
}

/** Cells of a row are as wide in metres as they are high, so that each row counts its own. */
function columnIn(row: number, longitude: number): number {
  const cos = Math.max(1e-6, Math.cos((row * CELL_DEG * Math.PI) / 180));
  return Math.floor((longitude * cos) / CELL_DEG);
}

function keepIn(
  cells: Map<string, { place: NamedPlace; of: Duplicate['of'] }[]>,
  place: NamedPlace,
  of: Duplicate['of'],
): void {
  const { row, column } = cellOf(place.latitude, place.longitude);
  const key = `${row} ${column}`;
  const there = cells.get(key);
  if (there === undefined) cells.set(key, [{ place, of }]);
  else there.push({ place, of });
}

function nearIn(
  cells: ReadonlyMap<string, readonly { place: NamedPlace; of: Duplicate['of'] }[]>,
  place: NamedPlace,
): Duplicate['of'] | undefined {
  const { row } = cellOf(place.latitude, place.longitude);
  for (let beside = row - 1; beside <= row + 1; beside++) {
    const column = columnIn(beside, place.longitude);
    for (let along = column - 1; along <= column + 1; along++) {
      const found = cells
        .get(`${beside} ${along}`)
        ?.find((each) => greatCircleKm(each.place, place) * M_PER_KM <= SAME_PLACE_M);
      if (found !== undefined) return found.of;
    }
  }
  return undefined;
}
