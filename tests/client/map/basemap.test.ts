import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gunzipSync } from 'node:zlib';
import { PMTiles } from 'pmtiles';
import { describe, expect, it } from 'vitest';
import { choosePlaces, printableName } from '../../../data/basemap/choose-places.ts';
import { type EncodeTile, tileEncoder } from '../../../data/basemap/encode-tiles.ts';
import { contains } from '../../../data/basemap/interior-point.ts';
import { labelCountries } from '../../../data/basemap/label-countries.ts';
import { readAtlas } from '../../../data/basemap/read-atlas.ts';
import { SEAS } from '../../../data/basemap/seas.ts';
import { pmtilesArchive } from '../../../data/basemap/write-pmtiles.ts';

const BASEMAP = fileURLToPath(new URL('../../../data/basemap/basemap.pmtiles', import.meta.url));
const STORED_TILES = 11_585;

/** The stored tile without its compression: zlib may pack the same bytes differently on another machine. */
function archiveOf(bytes: Buffer): PMTiles {
  return new PMTiles({
    getKey: () => 'test',
    getBytes: async (offset, length) => ({ data: Uint8Array.from(bytes.subarray(offset, offset + length)).buffer }),
  });
}

describe('the shipped base map', () => {
  const stored = readFileSync(BASEMAP);
  const archive = archiveOf(stored);

  it('is one clustered archive of gzipped vector tiles, zooms 0 to 7, under 5 MB', async () => {
    const header = await archive.getHeader();
    expect(stored.length).toBeLessThan(5_000_000);
    expect(header).toMatchObject({
      specVersion: 3,
      clustered: true,
      tileType: 1,
      tileCompression: 2,
      minZoom: 0,
      maxZoom: 7,
    });
    expect(header.numAddressedTiles).toBe(STORED_TILES);
    expect(header.leafDirectoryLength).toBeGreaterThan(0);
    expect(header.tileDataOffset + (header.tileDataLength ?? 0)).toBe(stored.length);
    expect(await archive.getMetadata()).toMatchObject({
      attribution: 'Made with Natural Earth. Places: GeoNames, CC BY 4.0',
    });
  });

  it('holds what its script makes from the same sources, tile for tile (9 tiles of 5 zooms)', {
    timeout: 120_000,
  }, async () => {
    const encode: EncodeTile = tileEncoder();
    const tiles = [
      [0, 0, 0],
      [1, 1, 0],
      [4, 9, 9],
      [4, 8, 5],
      [5, 0, 17],
      [7, 74, 71],
      [7, 66, 44],
      [7, 0, 0],
      [7, 127, 70],
    ];
    for (const [z = 0, x = 0, y = 0] of tiles) {
      const made = encode(z, x, y);
      const kept = await archive.getZxy(z, x, y);
      expect(kept === undefined ? null : Buffer.from(kept.data).toString('base64'), `tile ${z}/${x}/${y}`).toBe(
        made === null ? null : Buffer.from(made).toString('base64'),
      );
    }
  });
});

describe('the archive writer', () => {
  it('gives every tile back, equal ones stored once, whatever order they came in', async () => {
    const tiles = Array.from({ length: 4 ** 5 }, (_, index) => {
      const [x, y] = [index % 32, Math.floor(index / 32)];
      return { z: 5, x, y, bytes: Buffer.from(x < 16 ? 'the same everywhere' : `tile ${x} ${y} ${'x'.repeat(x)}`) };
    });
    const bytes = pmtilesArchive({ tiles, maxZoom: 5, metadata: {} });
    expect(pmtilesArchive({ tiles: tiles.toReversed(), maxZoom: 5, metadata: {} }).equals(bytes)).toBe(true);
    const archive = archiveOf(bytes);
    expect(await archive.getHeader()).toMatchObject({ numAddressedTiles: 1024, numTileContents: 513 });
    let checked = 0;
    for (const { z, x, y, bytes: expected } of tiles) {
      const found = await archive.getZxy(z, x, y);
      if (found === undefined || !expected.equals(Buffer.from(found.data)))
        throw new Error(`tile ${z}/${x}/${y} differs`);
      checked += 1;
    }
    expect(checked).toBe(1024);
  });

  it('writes gzip that any reader unpacks', () => {
    const bytes = pmtilesArchive({
      tiles: [{ z: 0, x: 0, y: 0, bytes: Buffer.from('one') }],
      maxZoom: 0,
      metadata: { a: 1 },
    });
    const metadataAt = Number(bytes.readBigUInt64LE(24));
    const metadataLength = Number(bytes.readBigUInt64LE(32));
    expect(gunzipSync(bytes.subarray(metadataAt, metadataAt + metadataLength)).toString()).toBe('{"a":1}');
  });
});

describe('what the map names', () => {
  const atlas = readAtlas('50m');

  it('sets every name of a sea on water', { timeout: 60_000 }, () => {
    expect(SEAS.length).toBeGreaterThan(150);
    expect(SEAS.filter((sea) => atlas.land.some((polygon) => contains(polygon, sea.position)))).toEqual([]);
  });

  it('sets every name of a country inside it, spelled out, in sentence case', { timeout: 60_000 }, () => {
    const labels = labelCountries(atlas.countries);
    expect(labels.length).toBeGreaterThan(200);
    const astray = labels.filter(
      ({ position: [longitude, latitude] }) =>
        !atlas.land.some(
          (polygon) => contains(polygon, [longitude, latitude]) || contains(polygon, [longitude + 360, latitude]),
        ),
    );
    expect(astray).toEqual([]);
    expect(labels.filter(({ name }) => name.includes('.') || name === name.toUpperCase())).toEqual([]);
    const france = labels.find(({ name }) => name === 'France');
    // In Europe, not in its overseas departments: metropolitan France lies between 5° W and 10° E (from memory).
    expect(france?.position[0]).toBeGreaterThan(-5);
    expect(france?.position[0]).toBeLessThan(10);
  });

  it('has no line or polygon that jumps across the map at 180°', () => {
    const lines = [...atlas.coast, ...atlas.border, ...atlas.land.flat()];
    const jumps = lines.flatMap((line) =>
      line.filter(
        (position, index) => Math.abs(position[0] - (line[index - 1]?.[0] ?? position[0])) > 180 && position[1] > -85,
      ),
    );
    expect(lines.length).toBeGreaterThan(2000);
    expect(jumps).toEqual([]);
  });

  it('shows towns but no districts of a bigger one beside them', { timeout: 60_000 }, () => {
    const places = choosePlaces();
    const names = new Set(places.map((place) => place.name));
    expect(
      ['Istanbul', 'Ankara', 'São Paulo', 'Windhoek', 'Łódź', 'Việt Trì'].filter((name) => !names.has(name)),
    ).toEqual([]);
    expect(['Üsküdar', 'Bağcılar', 'Çankaya', 'Iztapalapa'].filter((name) => names.has(name))).toEqual([]);
    expect(places.filter((place) => place.capital).length).toBeGreaterThan(200);
  });

  it('prints names in letters that its fonts have', () => {
    expect(printableName({ name: 'Ar Riyāḑ', country: 'SA' })).toBe('Ar Riyad');
    expect(printableName({ name: 'Rīga', country: 'LV' })).toBe('Rīga');
    expect(printableName({ name: 'Việt Trì', country: 'VN' })).toBe('Việt Trì');
    expect(printableName({ name: 'Октябрьский', country: 'RU' })).toBeNull();
  });
});
