import { createHash } from 'node:crypto';
import { Router } from 'express';
import type { Relief } from '#engine/weather-files/relief.ts';
import { rgbPng } from './png.ts';
import { tileNamed } from './tile-name.ts';

/** A day without asking; after it the fingerprint settles whether the relief is another. */
const CACHE_CONTROL = 'public, max-age=86400, stale-while-revalidate=604800';
const TILE_PX = 256;
/** On the whole world at once shading says nothing; beyond the last zoom pixels would show the facets between the nodes of the grid. */
const ZOOMS = { least: 2, most: 5 } as const;
/** Tiles kept, some 40 kB each. */
const MOST_KEPT = 256;
/** Terrarium: height + 32768 m in red x 256 + green + blue / 256. */
const BELOW_ALL_M = 32_768;

interface Tile {
  readonly zoom: number;
  readonly column: number;
  readonly row: number;
}

/**
 * Serves heights of the ground as raster tiles under `/relief/:z/:x/:y.png`, in the terrarium encoding, for shading: Mercator's
 * sheet in tiles of 256 pixels. Each is made when it is first asked for.
 */
export function reliefRouter(relief: Relief): Router {
  const kept = new Map<string, Promise<Buffer>>();
  const pictureOf = (tile: Tile): Promise<Buffer> => {
    const key = `${tile.zoom}/${tile.column}/${tile.row}`;
    const picture = kept.get(key) ?? rgbPng(terrarium(relief, tile), { width: TILE_PX, height: TILE_PX });
    kept.delete(key);
    kept.set(key, picture);
    picture.catch(() => kept.delete(key));
    for (const oldest of kept.keys()) if (kept.size > MOST_KEPT) kept.delete(oldest);
    return picture;
  };
  const router = Router();
  router.get('/relief/:z/:x/:y.png', async (request, response) => {
    const tile = tileNamed(request.params);
    if (tile === null) {
      response.status(400).type('text/plain').send('A tile is named by three whole numbers: zoom, column, row.');
      return;
    }
    const { zoom, column, row } = tile;
    if (zoom < ZOOMS.least || zoom > ZOOMS.most || column >= 2 ** zoom || row >= 2 ** zoom) {
      const zooms = `${ZOOMS.least} to ${ZOOMS.most}`;
      response.status(404).type('text/plain').send(`The relief has zooms ${zooms} and no such tile.`);
      return;
    }
    const picture = await pictureOf(tile);
    const fingerprint = createHash('sha256').update(picture).digest('base64url').slice(0, 16);
    response
      .set({ 'Cache-Control': CACHE_CONTROL, ETag: `"${fingerprint}"` })
      .type('image/png')
      .send(picture);
  });
  return router;
}

/** Heights at the middles of the pixels. */
function terrarium(relief: Relief, { zoom, column, row }: Tile): Uint8Array {
  const side = TILE_PX * 2 ** zoom;
  const rgb = new Uint8Array(TILE_PX * TILE_PX * 3);
  for (let y = 0, at = 0; y < TILE_PX; y++) {
    const height = Math.PI * (1 - (2 * (row * TILE_PX + y + 0.5)) / side);
    const latitude = (Math.atan(Math.sinh(height)) * 180) / Math.PI;
    for (let x = 0; x < TILE_PX; x++, at += 3) {
      const longitude = ((column * TILE_PX + x + 0.5) / side) * 360 - 180;
      const encoded = Math.round(relief.heightM(latitude, longitude)) + BELOW_ALL_M;
      rgb[at] = encoded >> 8;
      rgb[at + 1] = encoded & 0xff;
    }
  }
  return rgb;
}
