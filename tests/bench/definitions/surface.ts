/**
 * The surface between 3,000 stations over 100,000 cells: `surf-build` finds each cell's 8 stations, `surf-slide` gives every cell its
 * new score after a slider moved, each against geokdbush; `loo` finds each station's nearest others, against looking at all of them;
 * the growth of building in cells and of leave-one-out in stations. What is compared is identical, and checked here.
 */
import { around } from 'geokdbush';
import * as h3 from 'h3-js';
import KDBush from 'kdbush';
import { defaultScore } from '#engine/brief/score-defaults.ts';
import { distanceWeights } from '#engine/interpolation/distance-weights.ts';
import { interpolateScores, type SurfacePoints } from '#engine/interpolation/interpolate-score.ts';
import { type Neighbours, nearestStations } from '#engine/interpolation/nearest-stations.ts';
import { nearestOthers } from '#engine/interpolation/other-stations.ts';
import { columnsOf, unitVectors } from '#engine/interpolation/sphere-vectors.ts';
import { type StationFigures, stationFigures } from '#engine/interpolation/station-figures.ts';
import { type RandomStation, randomStations } from '../../engine/interpolation/random-stations.ts';
import type { Bench } from '../bench.ts';
import { growthExponent, processorMs, sideBySide } from '../side-by-side.ts';

const EACH = 8;
const POWER = 2;
const STATIONS = 3000;
const RESOLUTION = 5;
/** Rings of cells around the first one: 101,401 cells. */
const RINGS = 183;
/** geokdbush takes so many of the cells while it is timed. */
const PLAIN_CELLS = 2000;
const CHECKED_CELLS = 500;

interface BenchCells {
  readonly latitudes: Float64Array;
  readonly longitudes: Float64Array;
  readonly vectors: Float64Array;
  readonly groupStarts: Uint32Array;
}

/** Cells in the order of their indexes, in groups of one parent two steps up, as the server has them. */
function benchCells(rings: number): BenchCells {
  const ids = h3.gridDisk(h3.latLngToCell(5, 20, RESOLUTION), rings).sort();
  const centres = ids.map((id) => h3.cellToLatLng(id));
  const latitudes = Float64Array.from(centres, ([latitude]) => latitude);
  const longitudes = Float64Array.from(centres, ([, longitude]) => longitude);
  const parents = ids.map((id) => h3.cellToParent(id, RESOLUTION - 2));
  const starts = parents.flatMap((parent, index) => (parent === parents[index - 1] ? [] : [index]));
  return {
    latitudes,
    longitudes,
    vectors: unitVectors({ latitudes, longitudes }),
    groupStarts: Uint32Array.of(...starts, ids.length),
  };
}

/** Stations over the land and sea that the cells cover, half of them in clusters. */
function benchStations(count: number): RandomStation[] {
  return randomStations(count, 41).map((station) => ({
    ...station,
    latitude: 5 + station.latitude / 3.4,
    longitude: 20 + station.longitude / 7,
  }));
}

function build(cells: BenchCells, stations: Float64Array): Neighbours {
  return nearestStations({ points: cells.vectors, groupStarts: cells.groupStarts, stations, each: EACH });
}

function indexOf(stations: readonly RandomStation[]): KDBush {
  const index = new KDBush(stations.length);
  for (const { longitude, latitude } of stations) index.add(longitude, latitude);
  index.finish();
  return index;
}

/** Every nth cell, so that all parts of the surface are timed. */
function somePlaces(cells: BenchCells, count: number): readonly number[] {
  const step = Math.floor(cells.latitudes.length / count);
  return Array.from({ length: count }, (_none, nth) => nth * step);
}

function bruteForce(points: Float64Array, point: number, stations: Float64Array): number[] {
  const squared = Array.from({ length: stations.length / 3 }, (_none, station) =>
    [0, 1, 2].reduce((sum, axis) => {
      const difference = (stations[3 * station + axis] ?? 0) - (points[3 * point + axis] ?? 0);
      return sum + difference * difference;
    }, 0),
  );
  return squared
    .map((_none, station) => station)
    .sort((one, other) => (squared[one] ?? 0) - (squared[other] ?? 0) || one - other)
    .slice(0, EACH);
}

function differing(found: Neighbours, cells: BenchCells, stations: Float64Array): number {
  return somePlaces(cells, CHECKED_CELLS).filter((cell) => {
    const ours = [...found.stations.subarray(cell * EACH, (cell + 1) * EACH)];
    return bruteForce(cells.vectors, cell, stations).some((station, place) => station !== ours[place]);
  }).length;
}

export const surfaceBuildBench: Bench = {
  name: 'surf-build',
  about: '8 nearest of 3,000 stations for 101,401 cells: geokdbush / by groups of cells',
  gate: 4,
  compare: 'at least',
  run: () => {
    const cells = benchCells(RINGS);
    const stations = benchStations(STATIONS);
    const vectors = unitVectors(columnsOf(stations));
    const index = indexOf(stations);
    const timed = somePlaces(cells, PLAIN_CELLS);
    const { plainMs, oursMs } = sideBySide({
      plain: () => timed.map((cell) => around(index, cells.longitudes[cell] ?? 0, cells.latitudes[cell] ?? 0, EACH)),
      plainUnits: PLAIN_CELLS / cells.latitudes.length,
      ours: () => build(cells, vectors),
      oursUnits: 1,
    });
    const wrong = differing(build(cells, vectors), cells, vectors);
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(0)} ms, by scaling`,
      ours: `${oursMs.toFixed(0)} ms`,
      fault: wrong === 0 ? null : `${wrong} of ${CHECKED_CELLS} cells have other neighbours than by brute force`,
    };
  },
};

/** One cell the plain way: search, weights, each component, the score. */
function plainScore(
  index: KDBush,
  at: { latitude: number; longitude: number; elevationM: number },
  { figures, stations }: { figures: StationFigures; stations: readonly RandomStation[] },
): number {
  const near = around(index, at.longitude, at.latitude, EACH).map((station) => ({
    station,
    km: Math.max(1e-9, distanceKm(at, stations[station] ?? at)),
  }));
  const sum = near.reduce((total, { km }) => total + km ** -POWER, 0);
  let [points, weights] = [0, 0];
  for (const { anchor, values, slopePerM, extremes } of figures.columns) {
    const mean = (of: (station: number) => number) =>
      near.reduce((total, { station, km }) => total + (km ** -POWER / sum) * of(station), 0);
    const height = mean((station) => stations[station]?.elevationM ?? 0);
    const estimate = mean((station) => values[station] ?? 0) + slopePerM * (at.elevationM - height);
    const raw = Math.min(Math.max(estimate, extremes.least), extremes.greatest);
    const normalised = Math.min(Math.max((100 * (raw - anchor.a0)) / (anchor.a100 - anchor.a0), 0), 100);
    points += normalised * anchor.weight;
    weights += anchor.weight;
  }
  return points / weights;
}

function distanceKm(
  one: { latitude: number; longitude: number },
  other: { latitude: number; longitude: number },
): number {
  return h3.greatCircleDistance([one.latitude, one.longitude], [other.latitude, other.longitude], 'km');
}

export const surfaceSlideBench: Bench = {
  name: 'surf-slide',
  about: 'the score of 101,401 cells after a slider moved: built anew by geokdbush / new values of known cells',
  gate: 100,
  compare: 'at least',
  run: () => {
    const cells = benchCells(RINGS);
    const count = cells.latitudes.length;
    const stations = benchStations(STATIONS);
    const neighbours = build(cells, unitVectors(columnsOf(stations)));
    const elevationsM = Float32Array.from({ length: count }, (_none, cell) => (cell * 37) % 2500);
    const held = new Int32Array(count).fill(-1);
    const points: SurfacePoints = { neighbours, weights: distanceWeights(neighbours, POWER), elevationsM, held };
    const index = indexOf(stations);
    const timed = somePlaces(cells, PLAIN_CELLS);
    const placeOf = (cell: number) => ({
      latitude: cells.latitudes[cell] ?? 0,
      longitude: cells.longitudes[cell] ?? 0,
      elevationM: elevationsM[cell] ?? 0,
    });
    const rebuilt = () => {
      const figures = stationFigures(defaultScore, stations);
      return timed.map((cell) => plainScore(index, placeOf(cell), { figures, stations }));
    };
    const slid = () => interpolateScores(stationFigures(defaultScore, stations), points);
    const { plainMs, oursMs } = sideBySide({
      plain: rebuilt,
      plainUnits: PLAIN_CELLS / count,
      ours: slid,
      oursUnits: 1,
    });
    const scores = slid();
    const farthest = rebuilt().reduce(
      (most, score, nth) => Math.max(most, Math.abs(score - (scores[timed[nth] ?? 0] ?? Number.NaN))),
      0,
    );
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(0)} ms, by scaling`,
      ours: `${oursMs.toFixed(1)} ms`,
      fault: farthest < 0.01 ? null : `scores differ by up to ${farthest} points`,
    };
  },
};

/** The nearest others of every station, by looking at all of them; columns and a short list, no objects. */
function othersByBruteForce(stations: Float64Array): Uint16Array {
  const count = stations.length / 3;
  const found = new Uint16Array(count * EACH);
  const nearest = new Float64Array(EACH);
  for (let station = 0; station < count; station++) {
    nearest.fill(Number.POSITIVE_INFINITY);
    const base = station * EACH;
    for (let other = 0; other < count; other++) {
      if (other === station) continue;
      const dx = (stations[3 * other] ?? 0) - (stations[3 * station] ?? 0);
      const dy = (stations[3 * other + 1] ?? 0) - (stations[3 * station + 1] ?? 0);
      const dz = (stations[3 * other + 2] ?? 0) - (stations[3 * station + 2] ?? 0);
      const squared = dx * dx + dy * dy + dz * dz;
      if (!(squared < (nearest[EACH - 1] ?? 0))) continue;
      let place = EACH - 1;
      for (; place > 0 && squared < (nearest[place - 1] ?? 0); place--) {
        nearest[place] = nearest[place - 1] ?? 0;
        found[base + place] = found[base + place - 1] ?? 0;
      }
      nearest[place] = squared;
      found[base + place] = other;
    }
  }
  return found;
}

export const leaveOneOutBench: Bench = {
  name: 'loo',
  about: 'the 8 nearest others of each of 6,000 stations: all looked at / a grid in space',
  gate: 5,
  compare: 'at least',
  run: () => {
    const stations = unitVectors(columnsOf(randomStations(2 * STATIONS, 43)));
    const { plainMs, oursMs } = sideBySide({
      plain: () => othersByBruteForce(stations),
      plainUnits: 1,
      ours: () => nearestOthers(stations, EACH),
      oursUnits: 1,
    });
    const plain = othersByBruteForce(stations);
    const wrong = nearestOthers(stations, EACH).stations.filter((station, at) => station !== plain[at]).length;
    return {
      ratio: plainMs / oursMs,
      plain: `${plainMs.toFixed(0)} ms`,
      ours: `${oursMs.toFixed(1)} ms`,
      fault: wrong === 0 ? null : `${wrong} neighbours differ`,
    };
  },
};

const GROWTH_ROUNDS = 5;

function bestMs(work: () => unknown): number {
  work();
  return Math.min(...Array.from({ length: GROWTH_ROUNDS }, () => processorMs(work)));
}

export const surfaceGrowthBench: Bench = {
  name: 'growth-surface',
  about: 'exponent of building the surface of 3,000 stations over 4,000 to 100,000 cells',
  gate: 1.05,
  compare: 'at most',
  run: () => {
    const stations = unitVectors(columnsOf(benchStations(STATIONS)));
    const points = [36, 73, 130, RINGS].map((rings) => {
      const cells = benchCells(rings);
      return { size: cells.latitudes.length, ms: bestMs(() => build(cells, stations)) };
    });
    return { ...growthWords(points), fault: null };
  },
};

export const leaveOneOutGrowthBench: Bench = {
  name: 'growth-loo',
  about: 'exponent of finding the nearest others of 750 to 6,000 stations',
  gate: 1.2,
  compare: 'at most',
  run: () => {
    const points = [750, 1500, 3000, 6000].map((size) => {
      const stations = unitVectors(columnsOf(randomStations(size, 43)));
      return { size, ms: bestMs(() => nearestOthers(stations, EACH)) };
    });
    return { ...growthWords(points), fault: null };
  },
};

function growthWords(points: readonly { size: number; ms: number }[]) {
  const words = (point: { size: number; ms: number } | undefined) => `${point?.size}: ${point?.ms.toFixed(1)} ms`;
  return { ratio: growthExponent(points), plain: words(points[0]), ours: words(points.at(-1)) };
}
