import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { inflateRawSync } from 'node:zlib';
import type { Relief } from '#engine/weather-files/relief.ts';
import {
  between,
  MARK,
  NODES_PER_DEGREE,
  type ReliefTile,
  TILE_COLUMNS,
  TILE_ROWS,
  TILE_STEPS,
  tileOfBytes,
} from './relief-layout.ts';

/** Tiles that stay unpacked, 44 kB each. */
const MOST_UNPACKED = 64;

/**
 * The approximate relief of the Earth. The file (about 2 MB) is read when the first height is asked for and kept in memory;
 * a tile of it is unpacked when it is first needed.
 * @param path the file that data/relief/build.ts makes
 * @throws from its two functions, when the file cannot be read or is something else
 */
export function openRelief(path: string): Relief {
  let stored: Uint8Array[] | null = null;
  const unpacked = new Map<number, ReliefTile>();
  const tileAt = (number: number): ReliefTile => {
    const known = unpacked.get(number);
    if (known !== undefined) return known;
    stored ??= storedTiles(path);
    const tile = tileOfBytes(inflateRawSync(stored[number] ?? new Uint8Array(0)));
    // The oldest goes first: files come in order of place more often than not.
    for (const oldest of unpacked.keys()) if (unpacked.size >= MOST_UNPACKED) unpacked.delete(oldest);
    unpacked.set(number, tile);
    return tile;
  };
  const valueAt = (plane: keyof ReliefTile, latitude: number, longitude: number): number => {
    if (!(Math.abs(latitude) <= 90) || !Number.isFinite(longitude)) return Number.NaN;
    const row = (latitude + 90) * NODES_PER_DEGREE;
    const column = ((longitude % 360) + 360) * NODES_PER_DEGREE;
    const tileRow = Math.min(TILE_ROWS - 1, Math.floor(row / TILE_STEPS));
    const tileColumn = Math.floor(column / TILE_STEPS);
    const tile = tileAt(tileRow * TILE_COLUMNS + (tileColumn % TILE_COLUMNS));
    return between(tile[plane], row - tileRow * TILE_STEPS, column - tileColumn * TILE_STEPS);
  };
  return {
    heightM: (latitude, longitude) => valueAt('heightsM', latitude, longitude),
    kmFromLand: (latitude, longitude) => valueAt('kmFromLand', latitude, longitude),
  };
}

/** The relief that comes with the program. */
export function shippedRelief(): Relief {
  return openRelief(fileURLToPath(new URL('../../data/relief/relief.bin', import.meta.url)));
}

function storedTiles(path: string): Uint8Array[] {
  const file = readFileSync(path);
  if (file.subarray(0, MARK.length).toString('latin1') !== MARK) throw new Error(`${path} is not a relief file`);
  let at = MARK.length + 4 * TILE_ROWS * TILE_COLUMNS;
  return Array.from({ length: TILE_ROWS * TILE_COLUMNS }, (_none, number) => {
    const start = at;
    at += file.readUInt32LE(MARK.length + 4 * number);
    return file.subarray(start, at);
  });
}
