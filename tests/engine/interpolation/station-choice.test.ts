import { describe, expect, test } from 'vitest';
import { greatCircleKm } from '#engine/interpolation/great-circle-km.ts';
import { rankStations } from '#engine/interpolation/station-choice.ts';

/** One degree of latitude on a sphere of 6371.0088 km: 2 pi R / 360. */
const KM_PER_DEGREE = (2 * Math.PI * 6371.0088) / 360;

describe('the station that stands for a site', () => {
  test('is the one with the least of distance / 100 km + |height difference| / 300 m', () => {
    const site = { latitude: 40, longitude: 10, elevationM: 500 };
    const stations = [
      { id: 'near and high', latitude: 40.1, longitude: 10, elevationM: 1400 },
      { id: 'far and level', latitude: 41, longitude: 10, elevationM: 500 },
      { id: 'near and low', latitude: 39.8, longitude: 10, elevationM: 350 },
    ];
    const ranked = rankStations({ site, stations });
    expect(ranked.map(({ id }) => id)).toEqual(['near and low', 'far and level', 'near and high']);
    const figures = [0.2 * KM_PER_DEGREE, KM_PER_DEGREE, 0.1 * KM_PER_DEGREE].map((km) => km / 100);
    expect(ranked[0]?.figure).toBeCloseTo((figures[0] ?? 0) + 0.5, 9);
    expect(ranked[1]?.figure).toBeCloseTo(figures[1] ?? 0, 9);
    expect(ranked[2]?.figure).toBeCloseTo((figures[2] ?? 0) + 3, 9);
    expect(ranked.map(({ heightDifferenceM }) => heightDifferenceM)).toEqual([-150, 0, 900]);
  });

  test('is the nearest while the height of the site is not known, and of equals the lesser id', () => {
    const stations = ['b', 'a'].map((id) => ({ id, latitude: 0, longitude: 1, elevationM: 2000 }));
    const ranked = rankStations({ site: { latitude: 0, longitude: 0, elevationM: null }, stations });
    expect(ranked.map(({ id, heightDifferenceM }) => [id, heightDifferenceM])).toEqual([
      ['a', null],
      ['b', null],
    ]);
    expect(ranked[0]?.figure).toBeCloseTo(KM_PER_DEGREE / 100, 9);
  });

  test('is measured across the date line, over a pole and between antipodes', () => {
    const at = (latitude: number, longitude: number) => ({ latitude, longitude });
    expect(greatCircleKm(at(0, 179.5), at(0, -179.5))).toBeCloseTo(KM_PER_DEGREE, 9);
    expect(greatCircleKm(at(89.5, 0), at(89.5, 180))).toBeCloseTo(KM_PER_DEGREE, 6);
    expect(greatCircleKm(at(30, 20), at(-30, -160))).toBeCloseTo(180 * KM_PER_DEGREE, 6);
    expect(greatCircleKm(at(52, 5), at(52, 5))).toBe(0);
  });
});
