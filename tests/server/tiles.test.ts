import { fileURLToPath } from 'node:url';
import express from 'express';
import { PNG } from 'pngjs';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { shippedRelief } from '../../server/tiles/relief.ts';
import { reliefRouter } from '../../server/tiles/relief-router.ts';
import { tilesRouter } from '../../server/tiles/tiles-router.ts';

const BASEMAP = fileURLToPath(new URL('../../data/basemap/basemap.pmtiles', import.meta.url));
/** Southern Africa at zoom 4: land, coast, borders and names. */
const WITH_LAND = '/tiles/4/9/9.mvt';
/** The South Pacific at zoom 7, far from any shore or label. */
const EMPTY = '/tiles/7/24/86.mvt';

const app = express().use(tilesRouter(BASEMAP));

function tile(path: string) {
  return request(app)
    .get(path)
    .buffer(true)
    .parse((response, done) => {
      const parts: Buffer[] = [];
      response.on('data', (part: Buffer) => parts.push(part));
      response.on('end', () => done(null, Buffer.concat(parts)));
    });
}

describe('base map tiles', () => {
  it('hands the stored gzip on to a client that takes it, and the same tile unpacked to one that does not', async () => {
    const packed = await tile(WITH_LAND).set('Accept-Encoding', 'gzip');
    const plain = await tile(WITH_LAND).set('Accept-Encoding', 'identity');
    expect(packed.status).toBe(200);
    expect(packed.headers['content-encoding']).toBe('gzip');
    expect(packed.headers['content-type']).toBe('application/vnd.mapbox-vector-tile');
    expect(plain.headers['content-encoding']).toBeUndefined();
    // superagent has already unzipped the first answer, as a browser would.
    expect(Buffer.compare(packed.body, plain.body)).toBe(0);
    expect(plain.body.length).toBeGreaterThan(1000);
    expect(plain.body.toString('latin1')).toContain('South Africa');
    expect(Number(packed.headers['content-length'])).toBeLessThan(plain.body.length);
  });

  it('lets browsers keep a tile and says when theirs is still good', async () => {
    const first = await tile(WITH_LAND);
    expect(first.headers['cache-control']).toContain('max-age=86400');
    const again = await tile(WITH_LAND).set('If-None-Match', String(first.headers.etag));
    expect(again.status).toBe(304);
    const other = await tile('/tiles/4/8/8.mvt').set('If-None-Match', String(first.headers.etag));
    expect(other.status).toBe(200);
  });

  it('answers 204 where there is nothing to draw', async () => {
    const answer = await tile(EMPTY);
    expect(answer.status).toBe(204);
    expect(answer.body).toHaveLength(0);
  });

  it('refuses coordinates that are not whole numbers with 400', async () => {
    const nonsense = [
      '-1/0/0',
      '1.5/0/0',
      'a/0/0',
      '01/0/0',
      '1/0x0/0',
      '1e0/0/0',
      '4/8/%2e%2e',
      '4/999999999/1',
      '4/ /1',
    ];
    const statuses = await Promise.all(nonsense.map(async (path) => (await tile(`/tiles/${path}.mvt`)).status));
    expect(statuses).toEqual(nonsense.map(() => 400));
  });

  it('answers 404 to tiles that lie outside the world or deeper than the map', async () => {
    const outside = ['8/0/0', '0/1/0', '0/0/1', '3/8/0', '7/0/128', '30/0/0'];
    const statuses = await Promise.all(outside.map(async (path) => (await tile(`/tiles/${path}.mvt`)).status));
    expect(statuses).toEqual(outside.map(() => 404));
  });

  it('has no address that reaches another file', async () => {
    const climbs = [
      '/tiles/../package.json',
      '/tiles/4/8/../../../package.json',
      '/tiles/4/8/%2e%2e%2f%2e%2e%2fpackage.json',
      '/tiles/basemap.pmtiles',
    ];
    const statuses = await Promise.all(climbs.map(async (path) => (await tile(path)).status));
    expect(statuses).toEqual(climbs.map(() => 404));
  });

  it('does not come up without its archive', () => {
    expect(() => tilesRouter('/nowhere/basemap.pmtiles')).toThrow('ENOENT');
  });
});

describe('relief tiles', () => {
  const shaded = express().use(reliefRouter(shippedRelief()));
  const picture = (path: string) =>
    request(shaded)
      .get(path)
      .buffer(true)
      .parse((response, done) => {
        const parts: Buffer[] = [];
        response.on('data', (part: Buffer) => parts.push(part));
        response.on('end', () => done(null, Buffer.concat(parts)));
      });

  /** Heights of a tile as MapLibre defines the terrarium encoding: red x 256 + green + blue / 256 - 32768. */
  function heights(png: Buffer): (column: number, row: number) => number {
    const { data, width } = PNG.sync.read(png);
    return (column, row) => {
      const at = 4 * (row * width + column);
      return (data[at] ?? 0) * 256 + (data[at + 1] ?? 0) + (data[at + 2] ?? 0) / 256 - 32_768;
    };
  }

  it('tell the heights of the ground at the middles of their pixels, and 0 at sea', async () => {
    const answer = await picture('/relief/5/18/18.png');
    expect(answer.status).toBe(200);
    expect(answer.headers['content-type']).toBe('image/png');
    const heightAt = heights(answer.body);
    const relief = shippedRelief();
    for (const [column, row] of [
      [0, 0],
      [100, 37],
      [120, 200],
    ] as const) {
      const longitude = ((18 * 256 + column + 0.5) / (256 * 32)) * 360 - 180;
      const latitude =
        (Math.atan(Math.sinh(Math.PI * (1 - (2 * (18 * 256 + row + 0.5)) / (256 * 32)))) * 180) / Math.PI;
      expect(heightAt(column, row)).toBe(Math.round(relief.heightM(latitude, longitude)));
      expect(heightAt(column, row)).toBeGreaterThan(300);
    }
    expect(heights((await picture('/relief/5/13/18.png')).body)(10, 10)).toBe(0);
  });

  it('are kept by browsers, and asked for again by their fingerprint', async () => {
    const first = await picture('/relief/3/4/4.png');
    expect(first.headers['cache-control']).toContain('max-age=86400');
    const again = await picture('/relief/3/4/4.png').set('If-None-Match', String(first.headers.etag));
    expect(again.status).toBe(304);
  });

  it('have no other zoom, no place outside the world, and no other name', async () => {
    const statuses = async (names: string[]) =>
      Promise.all(names.map(async (name) => (await picture(`/relief/${name}.png`)).status));
    expect(await statuses(['1/0/0', '6/0/0', '3/8/0', '5/0/32'])).toEqual([404, 404, 404, 404]);
    expect(await statuses(['-3/0/0', '3/a/0', '03/0/0', '3/1.5/0'])).toEqual([400, 400, 400, 400]);
  });
});
