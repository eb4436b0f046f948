/** Makes basemap.pmtiles beside this file: `npx tsx data/basemap/build.ts`. About 15 s and 1.2 GB of memory. */
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { type EncodeTile, MAX_ZOOM, tileEncoder } from './encode-tiles.ts';
import { pmtilesArchive, type Tile } from './write-pmtiles.ts';

const METADATA = {
  name: 'Muslin base map',
  attribution: 'Made with Natural Earth. Places: GeoNames, CC BY 4.0',
  vector_layers: [
    { id: 'land', fields: {} },
    { id: 'coast', fields: {} },
    { id: 'border', fields: {} },
    { id: 'water', fields: { name: 'String', kind: 'String' } },
    { id: 'country', fields: { name: 'String', rank: 'Number' } },
    { id: 'place', fields: { name: 'String', rank: 'Number', population: 'Number', capital: 'Number' } },
  ],
};

/** Every tile of every zoom that holds something. */
function allTiles(encode: EncodeTile): Tile[] {
  const tiles: Tile[] = [];
  for (let z = 0; z <= MAX_ZOOM; z += 1) {
    const before = tiles.length;
    for (let x = 0; x < 2 ** z; x += 1) {
      for (let y = 0; y < 2 ** z; y += 1) {
        const bytes = encode(z, x, y);
        if (bytes !== null) tiles.push({ z, x, y, bytes });
      }
    }
    console.log(`zoom ${z}: ${tiles.length - before} tiles`);
  }
  return tiles;
}

const path = fileURLToPath(new URL('basemap.pmtiles', import.meta.url));
const archive = pmtilesArchive({ tiles: allTiles(tileEncoder()), maxZoom: MAX_ZOOM, metadata: METADATA });
writeFileSync(path, archive);
console.log(`${path}: ${(archive.length / 1e6).toFixed(2)} MB`);
