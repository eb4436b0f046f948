/** Makes relief.bin beside this file from the relief of Debian's package ferret-datasets: `npx tsx data/relief/build.ts [etopo5.cdf]`. */
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { deflateRawSync } from 'node:zlib';
import {
  MARK,
  type ReliefTile,
  storedKm,
  TILE_COLUMNS,
  TILE_ROWS,
  TILE_STEPS,
  tileBytes,
} from '../../server/tiles/relief-layout.ts';
import { readAtlas } from '../basemap/read-atlas.ts';
import { kmFromLand } from './km-from-land.ts';
import { landNodes } from './land-nodes.ts';
import { readNetcdf } from './read-netcdf.ts';
import { seaNodes } from './sea-nodes.ts';
import { COLUMNS, nodeAt, ROWS } from './world-grid.ts';

const PACKAGED = '/usr/share/ferret-vis/data/etopo5.cdf';
/** Just under the shores of the Dead Sea; what is lower without being the ocean is the floor of a lake. */
const LOWEST_LAND_M = -430;

function readHeights(path: string): Float32Array {
  const relief = readNetcdf(readFileSync(path)).get('ROSE');
  if (relief?.shape[0] !== ROWS || relief.shape[1] !== COLUMNS) throw new Error(`${path} holds no 5-minute relief`);
  return relief.floats();
}

function tileOf(row: number, column: number, planes: { heightsM: Float32Array; km: Float32Array }): ReliefTile {
  const side = TILE_STEPS + 1;
  const nodes = Array.from({ length: side * side }, (_none, at) =>
    nodeAt(row * TILE_STEPS + Math.floor(at / side), column * TILE_STEPS + (at % side)),
  );
  return {
    heightsM: Int16Array.from(nodes, (node) => Math.round(planes.heightsM[node] ?? 0)),
    kmFromLand: Uint8Array.from(nodes, (node) => storedKm(planes.km[node] ?? 0)),
  };
}

const atlas = readAtlas('10m');
const heightsM = readHeights(process.argv[2] ?? PACKAGED);
const land = landNodes(atlas.land);
const km = kmFromLand(land, atlas.coast);
const sea = seaNodes(heightsM);
for (let node = 0; node < heightsM.length; node++) {
  const dry = sea[node] === 0 && land[node] === 1;
  heightsM[node] = dry ? Math.max(LOWEST_LAND_M, heightsM[node] ?? 0) : 0;
}
const tiles: Uint8Array[] = [];
for (let row = 0; row < TILE_ROWS; row++) {
  for (let column = 0; column < TILE_COLUMNS; column++) {
    tiles.push(deflateRawSync(tileBytes(tileOf(row, column, { heightsM, km })), { level: 9 }));
  }
}
const lengths = new Uint8Array(4 * tiles.length);
tiles.forEach((tile, number) => {
  new DataView(lengths.buffer).setUint32(4 * number, tile.length, true);
});
const file = Buffer.concat([Buffer.from(MARK, 'latin1'), lengths, ...tiles]);
writeFileSync(fileURLToPath(new URL('relief.bin', import.meta.url)), file);
console.log(`${tiles.length} tiles, ${file.length} bytes`);
