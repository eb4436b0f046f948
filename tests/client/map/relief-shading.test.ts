import { describe, expect, test } from 'vitest';
import { shadedRelief } from '../../../src/map/relief-shading.ts';

const SIZE = 16;
const ZOOM = 5;
/** Just south of the equator, where a pixel is as wide as the world's width says. */
const ROW = 16;

/** A plane that rises by so many metres per pixel. */
function plane(eastM: number, southM: number): Float32Array {
  return Float32Array.from(
    { length: SIZE * SIZE },
    (_none, at) => eastM * (at % SIZE) + southM * Math.floor(at / SIZE),
  );
}

function shade(heightsM: Float32Array): number[][] {
  const pixels = shadedRelief({ heightsM, size: SIZE, zoom: ZOOM, row: ROW });
  return Array.from({ length: SIZE * SIZE }, (_none, at) => [...pixels.subarray(4 * at, 4 * at + 4)]);
}

/** On a middle grey, as the eye sees it. */
const toneOf = ([red = 0, , , alpha = 0]: readonly number[]) => 128 + (red - 128) * (alpha / 255);

describe('shading of the ground', () => {
  test('leaves level ground as the paper is', () => {
    expect(new Set(shade(plane(0, 0)).flat())).toEqual(new Set([0]));
  });

  test('is light on slopes that face north-west, dark on those that face south-east, and between them on the others', () => {
    const rise = 40_000;
    const facing = (east: number, south: number) => toneOf(shade(plane(rise * east, rise * south))[SIZE * 8 + 8] ?? []);
    const [northWest, southEast] = [facing(1, 1), facing(-1, -1)];
    expect(northWest).toBeGreaterThan(150);
    expect(southEast).toBeLessThan(100);
    for (const across of [facing(1, -1), facing(-1, 1)]) {
      expect(across).toBeGreaterThan(southEast);
      expect(across).toBeLessThan(northWest);
    }
  });

  test('is the stronger the steeper the slope', () => {
    const alphas = [500, 2000, 8000, 32_000].map((rise) => shade(plane(-rise, -rise))[SIZE * 8 + 8]?.[3] ?? 0);
    expect(alphas[0]).toBeGreaterThan(0);
    expect(alphas).toEqual(alphas.toSorted((one, other) => one - other));
    expect(new Set(alphas).size).toBe(alphas.length);
  });

  test('is the same at the edge of a tile as in the middle of an even slope: no seam between tiles', () => {
    const row = shade(plane(3000, 0)).slice(SIZE * 8, SIZE * 9);
    expect(new Set(row.map((pixel) => pixel.join(' '))).size).toBe(1);
  });
});
