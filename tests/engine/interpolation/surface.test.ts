import { describe, expect, test } from 'vitest';
import { defaultScore } from '#engine/brief/score-defaults.ts';
import { distanceWeights } from '#engine/interpolation/distance-weights.ts';
import { estimateBetween } from '#engine/interpolation/estimate-between.ts';
import { greatCircleKm } from '#engine/interpolation/great-circle-km.ts';
import { interpolateColumn, interpolateScores, type SurfacePoints } from '#engine/interpolation/interpolate-score.ts';
import { choosePower, leaveOneOutOfScore, POWERS } from '#engine/interpolation/leave-one-out.ts';
import { type Neighbours, nearestStations } from '#engine/interpolation/nearest-stations.ts';
import { nearestOthers } from '#engine/interpolation/other-stations.ts';
import { columnsOf, unitVectors } from '#engine/interpolation/sphere-vectors.ts';
import { stationFigures } from '#engine/interpolation/station-figures.ts';
import { bestSupport, supportClass } from '#engine/interpolation/support-class.ts';
import { weightedScore } from '#engine/score/weighted-score.ts';
import { type RandomStation, randomStations } from './random-stations.ts';

const EACH = 8;

/** Every station for every point, sorted by distance: what the quick searches have to equal. */
function bruteForce(from: readonly RandomStation[], to: readonly RandomStation[], leaveOutSelf: boolean): number[][] {
  const [points, stations] = [unitVectors(columnsOf(from)), unitVectors(columnsOf(to))];
  const chord = (point: number, station: number): number =>
    [0, 1, 2].reduce((sum, axis) => {
      const difference = (stations[3 * station + axis] ?? 0) - (points[3 * point + axis] ?? 0);
      return sum + difference * difference;
    }, 0);
  return from.map((_point, point) =>
    to
      .map((_station, station) => station)
      .filter((station) => !leaveOutSelf || station !== point)
      .sort((one, other) => chord(point, one) - chord(point, other) || one - other)
      .slice(0, EACH),
  );
}

function listed({ points, each, stations }: Neighbours): number[][] {
  return Array.from({ length: points }, (_none, point) => [...stations.subarray(point * each, (point + 1) * each)]);
}

/** Points in blocks of whole tens of degrees, as cells come by their parents. */
function inBlocks(points: readonly RandomStation[]) {
  const keyOf = ({ latitude, longitude }: RandomStation) =>
    100 * Math.floor((latitude + 90) / 10) + Math.floor((longitude + 180) / 10);
  const sorted = points.toSorted((one, other) => keyOf(one) - keyOf(other));
  const starts = sorted.flatMap((point, index) =>
    index === 0 || keyOf(point) !== keyOf(sorted[index - 1] ?? point) ? [index] : [],
  );
  return { sorted, groupStarts: Uint32Array.of(...starts, sorted.length) };
}

describe('the neighbours of a surface', () => {
  const stations = randomStations(400, 1);

  test('found by groups are those that looking at every station gives, with their distances along the great circle', () => {
    const { sorted, groupStarts } = inBlocks(randomStations(600, 2));
    const found = nearestStations({
      points: unitVectors(columnsOf(sorted)),
      groupStarts,
      stations: unitVectors(columnsOf(stations)),
      each: EACH,
    });
    expect(listed(found)).toEqual(bruteForce(sorted, stations, false));
    for (let at = 0; at < found.km.length; at += 97) {
      const [point, station] = [sorted[Math.floor(at / EACH)], stations[found.stations[at] ?? 0]];
      if (point === undefined || station === undefined) throw new Error('a neighbour that is none');
      expect(Math.abs((found.km[at] ?? 0) - greatCircleKm(point, station))).toBeLessThan(0.01);
    }
  });

  test('of the stations themselves, found in a grid, are those that looking at all others gives, where several share a place too', () => {
    const twice = [...stations, ...stations.slice(0, 40)];
    expect(listed(nearestOthers(unitVectors(columnsOf(twice)), EACH))).toEqual(bruteForce(twice, twice, true));
  });

  test('are as many as there are', () => {
    expect(nearestOthers(unitVectors(columnsOf(stations.slice(0, 3))), EACH).each).toBe(2);
    expect(nearestOthers(unitVectors(columnsOf(stations.slice(0, 1))), EACH).each).toBe(0);
    const one = { points: unitVectors(columnsOf(stations)), groupStarts: Uint32Array.of(0, 400), each: EACH };
    expect(nearestStations({ ...one, stations: unitVectors(columnsOf(stations.slice(0, 2))) }).each).toBe(2);
  });
});

function pointsOf(places: readonly RandomStation[], stations: readonly RandomStation[], power: number): SurfacePoints {
  const neighbours = nearestStations({
    points: unitVectors(columnsOf(places)),
    groupStarts: Uint32Array.of(0, places.length),
    stations: unitVectors(columnsOf(stations)),
    each: EACH,
  });
  return {
    neighbours,
    weights: distanceWeights(neighbours, power),
    elevationsM: Float32Array.from(places, ({ elevationM }) => elevationM),
    held: new Int32Array(places.length).fill(-1),
  };
}

const scoreOf = ({ raw }: RandomStation) =>
  weightedScore(defaultScore, raw, { indexPoints: false }).scoreExact ?? Number.NaN;

describe('the surface between stations', () => {
  const stations = randomStations(120, 3);
  const places = randomStations(300, 4);
  const figures = stationFigures(defaultScore, stations);

  test.each(POWERS)(
    'power %d: every raw component stays within the range of its stations, on the highest peak too',
    (power) => {
      const high = places.map((place, index) => ({ ...place, elevationM: index % 3 === 0 ? 8000 : place.elevationM }));
      const points = pointsOf(high, stations, power);
      for (const column of figures.columns) {
        const raw = interpolateColumn(column, { figures, points });
        expect(column.slopePerM).not.toBe(0);
        expect(Math.min(...raw)).toBeGreaterThanOrEqual(Math.min(...column.values));
        expect(Math.max(...raw)).toBeLessThanOrEqual(Math.max(...column.values));
      }
    },
  );

  test('a query at a station returns the station, to the last figure', () => {
    const asked = { stations, anchors: defaultScore, indexPoints: false, each: EACH, power: 2 };
    for (const station of stations) {
      const { weighted, basis, support } = estimateBetween({ ...asked, position: station, elevationM: 0 });
      expect(weighted.scoreExact).toBe(scoreOf(station));
      expect(weighted.parts.map(({ raw }) => raw)).toEqual(defaultScore.map(({ component }) => station.raw[component]));
      expect(basis[0]).toMatchObject({ distanceKm: 0, heightDifferenceM: 0, weight: 1 });
      expect(support).toBe('full');
    }
  });

  test('a cell that holds a station shows that station, whatever lies around', () => {
    const points = pointsOf(places, stations, 2);
    const held = points.held.map((_none, point) => point % stations.length);
    const scores = interpolateScores(figures, { ...points, held });
    for (const [point, score] of scores.entries()) {
      const station = stations[point % stations.length];
      expect(score).toBeCloseTo(station === undefined ? Number.NaN : scoreOf(station), 4);
    }
  });

  test('the score of a cell is that of its components, each interpolated by itself, to the last bit', () => {
    const points = pointsOf(places, stations, 2);
    const sums = new Float32Array(places.length);
    for (const column of figures.columns) {
      const { a0, a100, weight } = column.anchor;
      for (const [point, raw] of interpolateColumn(column, { figures, points }).entries())
        sums[point] = (sums[point] ?? 0) + Math.min(Math.max((raw - a0) * (100 / (a100 - a0)), 0), 100) * weight;
    }
    const total = figures.columns.reduce((sum, { anchor }) => sum + anchor.weight, 0);
    expect(interpolateScores(figures, points)).toEqual(sums.map((sum) => sum / total));
  });

  test('the surface and a single query come to the same', () => {
    const scores = interpolateScores(figures, pointsOf(places, stations, 2.5));
    const asked = { stations, anchors: defaultScore, indexPoints: false, each: EACH, power: 2.5 };
    for (const [index, place] of places.slice(0, 50).entries()) {
      const { weighted, basis } = estimateBetween({ ...asked, position: place, elevationM: place.elevationM });
      expect(Math.abs((weighted.scoreExact ?? 0) - (scores[index] ?? 0))).toBeLessThan(1e-3);
      expect(basis.reduce((sum, { weight }) => sum + weight, 0)).toBeCloseTo(1, 5);
    }
  });

  test('a component that does not apply at some stations is taken from the others; one that applies nowhere is left out', () => {
    const patchy = stations.map((station, index) => ({
      ...station,
      raw: { ...station.raw, damp: null, water: index % 2 === 0 ? null : 3 },
    }));
    const columns = stationFigures(defaultScore, patchy);
    expect(columns.columns.map(({ anchor }) => anchor.component)).not.toContain('damp');
    const water = columns.columns.find(({ anchor }) => anchor.component === 'water');
    if (water === undefined) throw new Error('water applies at half of the stations');
    const points = pointsOf(places, patchy, 2);
    const raws = interpolateColumn(water, { figures: columns, points });
    expect(raws.every((raw) => raw === 3 || Number.isNaN(raw))).toBe(true);
    const [place] = places;
    if (place === undefined) throw new Error('no place');
    const asked = { stations: patchy, anchors: defaultScore, indexPoints: false, each: EACH, power: 2 };
    const single = estimateBetween({ ...asked, position: place, elevationM: place.elevationM }).weighted.scoreExact;
    expect(interpolateScores(columns, points)[0]).toBeCloseTo(single ?? Number.NaN, 3);
  });

  test('height tells a slope with 8 stations over 300 m, and none with fewer or flatter ones', () => {
    // 0, 500, 1000 m and 30.0, 26.75, 23.5 lie on -6.5 per km.
    const onSlope = (count: number, spanM: number) =>
      stationFigures(
        defaultScore,
        stations.slice(0, count).map((station, index) => {
          const elevationM = (spanM * index) / (count - 1);
          return { ...station, elevationM, raw: { ...station.raw, served: 80 - 0.0065 * elevationM } };
        }),
      ).columns[0]?.slopePerM;
    expect(onSlope(8, 1000)).toBeCloseTo(-0.0065, 9);
    expect(onSlope(8, 299)).toBe(0);
    expect(onSlope(7, 1000)).toBe(0);
  });
});

describe('the leave-one-out error', () => {
  const stations = randomStations(60, 5);
  const figures = stationFigures(defaultScore, stations);
  const others = nearestOthers(unitVectors(columnsOf(stations)), EACH);

  test('is what estimating each station from a list of the others alone gives', () => {
    const power = 2;
    const own = stations.map((station, index) => {
      const rest = stations.filter((_other, at) => at !== index);
      const asked = { stations: rest, anchors: defaultScore, indexPoints: false, each: EACH, power };
      const estimate = estimateBetween({ ...asked, position: station, elevationM: station.elevationM });
      return (estimate.weighted.scoreExact ?? Number.NaN) - scoreOf(station);
    });
    const found = leaveOneOutOfScore({ figures, others, power });
    for (const [index, error] of own.entries()) expect(found.errors[index]).toBeCloseTo(error, 3);
    const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
    expect(found.bias).toBeCloseTo(mean(own), 3);
    expect(found.meanAbsolute).toBeCloseTo(mean(own.map(Math.abs)), 3);
    expect(found.rootMeanSquare).toBeCloseTo(Math.sqrt(mean(own.map((error) => error * error))), 3);
  });

  test('chooses the power', () => {
    const chosen = choosePower({ figures, others });
    const errors = POWERS.map((power) => leaveOneOutOfScore({ figures, others, power }).rootMeanSquare);
    expect(chosen.rootMeanSquare).toBe(Math.min(...errors));
    expect(chosen.power).toBe(POWERS[errors.indexOf(Math.min(...errors))]);
  });
});

test('an estimate is full to 50 km and 150 m of a station, pale to 100 km and 300 m, and none beyond', () => {
  expect(supportClass(50, -150)).toBe('full');
  expect(supportClass(50.1, 0)).toBe('pale');
  expect(supportClass(0, 151)).toBe('pale');
  expect(supportClass(100, 300)).toBe('pale');
  expect(supportClass(100.1, 0)).toBe('none');
  expect(supportClass(0, -301)).toBe('none');
  expect(bestSupport(['none', 'pale', 'full'])).toBe('full');
  expect(bestSupport([])).toBe('none');
});
