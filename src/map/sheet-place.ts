import type { Grade } from '../contract/runs.ts';

/** A station is an open triangle, a site a ruled square with a letter: survey marks, not pins. */
export type PlaceKind = 'station' | 'site';

/** What the map has to know of a place; its colour comes apart, since that changes while a slider moves. */
export interface SheetPlace {
  readonly id: string;
  readonly name: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly grade: Grade;
  /** Letters of a site: a to z, then aa; a station has none. */
  readonly letters?: string;
}

/** Names a place of either kind. */
export interface PlaceRef {
  readonly kind: PlaceKind;
  readonly id: string;
}

/** How the layer in view inks a mark. */
export interface MarkInk {
  /** null: hollow, the layer has no figure for the place. */
  readonly colour: string | null;
  /** What stands under the name, as a sheet prints a height under a summit; may be empty. */
  readonly figure: string;
}

export type MarkInks = ReadonlyMap<string, MarkInk>;

export interface Position {
  readonly latitude: number;
  readonly longitude: number;
}

export function isSame(one: PlaceRef | null, other: PlaceRef | null): boolean {
  return one?.kind === other?.kind && one?.id === other?.id;
}
