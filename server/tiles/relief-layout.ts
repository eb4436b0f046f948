/**
 * How data/relief/relief.bin is laid out: the mark, the length of each tile as uint32 little-endian, then the tiles, each deflated.
 * Tiles are squares of 10°, from 90° south upwards and from the meridian of Greenwich eastwards; they share the nodes of
 * their edges. A tile holds three planes of one byte a node, row by row from the south: the low and the high bytes of the heights,
 * and the distances from land.
 */
import { FARTHEST_TOLD_KM } from '#engine/weather-files/relief.ts';

export const NODES_PER_DEGREE = 12;
/** Nodes along the side of a tile without the last, which belongs to the next tile as well. */
export const TILE_STEPS = 120;
export const TILE_ROWS = 18;
export const TILE_COLUMNS = 36;
export const MARK = 'muslin relief 1\n';

const SIDE = TILE_STEPS + 1;
const NODES = SIDE * SIDE;

export interface ReliefTile {
  /** Metres, whole. */
  readonly heightsM: Int16Array;
  /** Kilometres, whole. */
  readonly kmFromLand: Uint8Array;
}

/** The bytes of a tile before they are deflated: each value less what its neighbours to the west and the south make likely. */
export function tileBytes(tile: ReliefTile): Uint8Array {
  const bytes = new Uint8Array(3 * NODES);
  for (let node = 0; node < NODES; node++) {
    const difference = (tile.heightsM[node] ?? 0) - likely(tile.heightsM, node);
    const folded = (difference << 1) ^ (difference >> 31);
    bytes[node] = folded & 0xff;
    bytes[NODES + node] = folded >> 8;
    bytes[2 * NODES + node] = (tile.kmFromLand[node] ?? 0) - likely(tile.kmFromLand, node);
  }
  return bytes;
}

/** @throws RangeError when the bytes are not those of a tile */
export function tileOfBytes(bytes: Uint8Array): ReliefTile {
  if (bytes.length !== 3 * NODES) throw new RangeError(`a relief tile has ${3 * NODES} bytes, not ${bytes.length}`);
  const heightsM = new Int16Array(NODES);
  const kmFromLand = new Uint8Array(NODES);
  for (let node = 0; node < NODES; node++) {
    const folded = (bytes[node] ?? 0) | ((bytes[NODES + node] ?? 0) << 8);
    heightsM[node] = likely(heightsM, node) + ((folded >> 1) ^ -(folded & 1));
    kmFromLand[node] = likely(kmFromLand, node) + (bytes[2 * NODES + node] ?? 0);
  }
  return { heightsM, kmFromLand };
}

/** What a plane through the three neighbours that are known already gives. */
function likely(values: Int16Array | Uint8Array, node: number): number {
  const west = node % SIDE === 0 ? 0 : (values[node - 1] ?? 0);
  const south = values[node - SIDE] ?? 0;
  const southWest = node % SIDE === 0 ? 0 : (values[node - SIDE - 1] ?? 0);
  return west + south - southWest;
}

/** The value of a plane of a tile between its nodes. @param row and column: nodes from the south-west corner, with fraction */
export function between(values: Int16Array | Uint8Array, row: number, column: number): number {
  const south = Math.min(TILE_STEPS - 1, Math.floor(row));
  const west = Math.min(TILE_STEPS - 1, Math.floor(column));
  const north = row - south;
  const east = column - west;
  const at = south * SIDE + west;
  const below = (values[at] ?? 0) * (1 - east) + (values[at + 1] ?? 0) * east;
  const above = (values[at + SIDE] ?? 0) * (1 - east) + (values[at + SIDE + 1] ?? 0) * east;
  return below * (1 - north) + above * north;
}

/** Kilometres as they are stored. */
export function storedKm(km: number): number {
  return Math.min(FARTHEST_TOLD_KM, Math.round(km));
}
