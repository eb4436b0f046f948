import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { FARTHEST_TOLD_KM } from '#engine/weather-files/relief.ts';
import { readNetcdf } from '../../../data/relief/read-netcdf.ts';
import { openRelief, shippedRelief } from '../../../server/tiles/relief.ts';
import { tileBytes, tileOfBytes } from '../../../server/tiles/relief-layout.ts';

const relief = shippedRelief();

describe('the approximate relief', () => {
  // Heights of airports and stations in open country as the headers of public weather files give them; La Paz, Madrid, Nairobi and
  // Mexico City from memory. In open country the grid is held to 80 m, on plateaus under mountains to 250 m.
  test.each([
    ['Phoenix', 33.45, -111.98, 337, 80],
    ['Denver', 39.83, -104.65, 1650, 80],
    ['Green River, Wyoming', 41.6, -109.07, 2054, 80],
    ['Greensboro', 36.1, -79.95, 270, 80],
    ['Addis Ababa', 8.98, 38.8, 2355, 80],
    ['Hangzhou', 30.23, 120.17, 43, 80],
    ['Miami', 25.8, -80.3, 2, 80],
    ['Madrid', 40.45, -3.55, 582, 80],
    ['Nairobi', -1.32, 36.92, 1624, 80],
    ['Mexico City', 19.43, -99.08, 2234, 80],
    ['La Paz', -16.5, -68.2, 4058, 250],
    ['the South Pole', -90, 12, 2835, 80],
  ] as const)('%s lies at its height, to the grain of the grid', (_name, latitude, longitude, heightM, withinM) => {
    expect(Math.abs(relief.heightM(latitude, longitude) - heightM)).toBeLessThanOrEqual(withinM);
    expect(relief.kmFromLand(latitude, longitude)).toBeLessThan(5);
  });

  test('the shores of the Dead Sea lie below the sea, which itself is 0', () => {
    expect(relief.heightM(31.42, 35.42)).toBeLessThan(-50);
    expect(relief.heightM(45, -45)).toBe(0);
    expect(relief.heightM(11.35, 142.2)).toBe(0);
  });

  test('the distance from land grows off a coast, to 3 km, and stops at what is told', () => {
    // Cape Agulhas stands at 34.833 S, 20.0 E (from memory); a degree of latitude is 111.195 km on a sphere of 6371.0088 km.
    for (const km of [10, 20, 30]) {
      expect(Math.abs(relief.kmFromLand(-34.833 - km / 111.195, 20) - km)).toBeLessThanOrEqual(3);
    }
    expect(relief.kmFromLand(45, -45)).toBe(FARTHEST_TOLD_KM);
    expect(relief.kmFromLand(56, 3)).toBe(FARTHEST_TOLD_KM);
  });

  test('small islands with weather stations are not far out at sea: Midway, Majuro, Bermuda, Ascension', () => {
    const islands = [
      [28.2, -177.38],
      [7.07, 171.27],
      [32.37, -64.68],
      [-7.97, -14.4],
    ] as const;
    for (const [latitude, longitude] of islands) expect(relief.kmFromLand(latitude, longitude)).toBeLessThan(10);
  });

  test('heights run on across the edges of tiles, the meridian of Greenwich and that of 180°, and up to the poles', () => {
    for (const [latitude, longitude] of [
      [40, 0],
      [47.3, 10],
      [-30, 20],
      [66, 180],
      [-80, 180],
    ] as const) {
      const here = relief.heightM(latitude, longitude);
      for (const away of [-1e-7, 1e-7]) {
        expect(relief.heightM(latitude + away, longitude + away)).toBeCloseTo(here, 1);
      }
      expect(relief.heightM(latitude, longitude - 360)).toBeCloseTo(here, 6);
    }
    expect(relief.heightM(90, -180)).toBe(0);
  });

  test('a place that is none has no height', () => {
    for (const [latitude, longitude] of [
      [90.1, 0],
      [Number.NaN, 0],
      [0, Number.POSITIVE_INFINITY],
    ] as const) {
      expect(relief.heightM(latitude, longitude)).toBeNaN();
    }
  });

  test('a tile comes out of its bytes as it went in, whatever its heights', () => {
    const nodes = 121 * 121;
    const heightsM = Int16Array.from({ length: nodes }, (_none, node) => ((node * 7919) % 9280) - 430);
    const kmFromLand = Uint8Array.from({ length: nodes }, (_none, node) => (node * 31) % 41);
    expect(tileOfBytes(tileBytes({ heightsM, kmFromLand }))).toEqual({ heightsM, kmFromLand });
    expect(() => tileOfBytes(new Uint8Array(7))).toThrow(RangeError);
  });

  test('another file is refused by name, when a height is asked for', () => {
    const wrong = fileURLToPath(new URL('relief.test.ts', import.meta.url));
    expect(() => openRelief(wrong).heightM(0, 0)).toThrow(/relief\.test\.ts is not a relief file/);
  });
});

describe('a netCDF file', () => {
  // Written by hand after the published description of the classic format: 1 dimension, no attributes but one, 1 variable.
  const name = (text: string) => [...uint32(text.length), ...new TextEncoder().encode(text.padEnd(4, '\0'))];
  const header = [
    ...[0x43, 0x44, 0x46, 1, ...uint32(0)],
    ...[...uint32(10), ...uint32(1), ...name('X'), ...uint32(3)],
    ...[...uint32(12), ...uint32(1), ...name('note'), ...uint32(2), ...uint32(3), 0x61, 0x62, 0x63, 0],
    ...[...uint32(11), ...uint32(1), ...name('ROSE'), ...uint32(1), ...uint32(0), ...uint32(0), ...uint32(0)],
    ...[...uint32(5), ...uint32(12)],
  ];
  const begin = header.length + 4;
  const values = new Uint8Array(12);
  [1.5, -2, 8848].forEach((value, index) => {
    new DataView(values.buffer).setFloat32(4 * index, value);
  });
  const file = Uint8Array.from([...header, ...uint32(begin), ...values]);

  test('gives its variables by name, with their shape and their values', () => {
    const rose = readNetcdf(file).get('ROSE');
    expect(rose?.shape).toEqual([3]);
    expect([...(rose?.floats() ?? [])]).toEqual([1.5, -2, 8848]);
  });

  test('of another version is refused', () => {
    expect(() => readNetcdf(Uint8Array.from([0x43, 0x44, 0x46, 2, 0, 0, 0, 0]))).toThrow(/not a classic netCDF file/);
  });
});

function uint32(value: number): number[] {
  return [value >>> 24, (value >>> 16) & 0xff, (value >>> 8) & 0xff, value & 0xff];
}
