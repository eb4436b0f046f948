import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { Router } from 'express';
import { PMTiles, SharedPromiseCache, type Source } from 'pmtiles';
import { tileNamed } from './tile-name.ts';

/** A day without asking; after it the fingerprint settles whether a newer base map was shipped. */
const CACHE_CONTROL = 'public, max-age=86400, stale-while-revalidate=604800';

/**
 * Serves the base map as vector tiles under `/tiles/:z/:x/:y.mvt`.
 *
 * The archive (about 4 MB) is read into memory once, so a request can reach no file: it names three numbers and no more.
 * Tiles are stored gzipped and handed on as they are to a client that takes gzip.
 *
 * @param pmtilesPath the archive that data/basemap/build.ts makes
 * @throws when the archive cannot be read: a server without its map does not start
 */
export function tilesRouter(pmtilesPath: string): Router {
  const archive = new PMTiles(memorySource(pmtilesPath), new SharedPromiseCache(), async (stored) => stored);
  const router = Router();
  router.get('/tiles/:z/:x/:y.mvt', async (request, response) => {
    const tile = tileNamed(request.params);
    if (tile === null) {
      response.status(400).type('text/plain').send('A tile is named by three whole numbers: zoom, column, row.');
      return;
    }
    const { zoom, column, row } = tile;
    const { maxZoom } = await archive.getHeader();
    if (zoom > maxZoom || column >= 2 ** zoom || row >= 2 ** zoom) {
      response.status(404).type('text/plain').send(`The base map has zooms 0 to ${maxZoom} and no such tile.`);
      return;
    }
    const stored = await archive.getZxy(zoom, column, row);
    response.set('Cache-Control', CACHE_CONTROL);
    if (stored === undefined) {
      response.status(204).end();
      return;
    }
    const gzipped = Buffer.from(stored.data);
    response.set({ ETag: fingerprint(gzipped), Vary: 'Accept-Encoding' }).type('application/vnd.mapbox-vector-tile');
    if (request.acceptsEncodings('gzip') === 'gzip') response.set('Content-Encoding', 'gzip').send(gzipped);
    else response.send(gunzipSync(gzipped));
  });
  return router;
}

function memorySource(path: string): Source {
  const bytes = readFileSync(path);
  return {
    getKey: () => 'basemap',
    getBytes: async (offset, length) => ({ data: Uint8Array.from(bytes.subarray(offset, offset + length)).buffer }),
  };
}

/** Weak, as the same tile goes out gzipped and plain. */
function fingerprint(bytes: Buffer): string {
  return `W/"${createHash('sha256').update(bytes).digest('base64url').slice(0, 16)}"`;
}
