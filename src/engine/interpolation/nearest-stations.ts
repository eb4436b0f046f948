/** The stations that an estimate rests on: for every cell of a surface, the nearest few. */
import { type NearestList, nearestList, offer, reachOf } from './nearest-list.ts';
import { kmOfSquaredChord } from './sphere-vectors.ts';

/** Neighbours of points, nearest first: those of point i stand at i x each .. i x each + each - 1. */
export interface Neighbours {
  readonly points: number;
  /** Per point; fewer than asked for where there are fewer stations. */
  readonly each: number;
  readonly stations: Uint16Array;
  /** Along the great circle, km. */
  readonly km: Float32Array;
}

/** Station numbers are stored in 16 bits. */
export const MOST_STATIONS = 65_535;

/** Rounding of a chord, well over what it can be. */
const SLACK = 1e-9;

/**
 * The nearest stations of every point, exactly those that looking at every station for every point gives. Points come in
 * groups that lie close together: what is near to none of a group's points is put aside once for all of them. With c the
 * middle of a group, R its radius and d the distance of c to its kth station, each of its points has its k nearest within
 * d + R of itself, so within d + 2 R of c (triangle inequality on chords).
 * @param input.points unit vectors, x, y, z in turn
 * @param input.groupStarts first point of each group, and at the end the count of points; one group of all is right, and slow
 * @param input.stations unit vectors; of equally near ones the lesser number comes first
 * @throws RangeError beyond 65,535 stations
 */
export function nearestStations(input: {
  points: Float64Array;
  groupStarts: Uint32Array;
  stations: Float64Array;
  each: number;
}): Neighbours {
  const { points, groupStarts, stations } = input;
  const stationCount = stations.length / 3;
  if (stationCount > MOST_STATIONS) throw new RangeError(`a surface rests on at most ${MOST_STATIONS} stations`);
  const each = Math.min(input.each, stationCount);
  const pointCount = points.length / 3;
  const found = {
    points: pointCount,
    each,
    stations: new Uint16Array(pointCount * each),
    km: new Float32Array(pointCount * each),
  };
  const list = nearestList(each);
  const toMiddle = new Float64Array(stationCount);
  const candidates = new Int32Array(stationCount);
  for (let group = 0; group + 1 < groupStarts.length; group++) {
    const [start, end] = [groupStarts[group] ?? 0, groupStarts[group + 1] ?? 0];
    const middle = middleOf(points, start, end);
    list.count = 0;
    for (let station = 0; station < stationCount; station++) {
      const squared = squaredChord(stations, station, middle);
      toMiddle[station] = squared;
      offer(list, station, squared);
    }
    const reach = Math.sqrt(reachOf(list)) + 2 * radiusOf(points, { start, end, middle }) + SLACK;
    let count = 0;
    for (let station = 0; station < stationCount; station++) {
      if ((toMiddle[station] ?? 0) <= reach * reach) candidates[count++] = station;
    }
    for (let point = start; point < end; point++) {
      nearestAmong(list, { points, point, stations, candidates, count });
      keep(found, point, list);
    }
  }
  return found;
}

/** The nearest stations of one point, by looking at every one. */
export function nearestOf(input: { point: Float64Array; stations: Float64Array; each: number }): Neighbours {
  const { point, ...others } = input;
  return nearestStations({ ...others, points: point, groupStarts: Uint32Array.of(0, 1) });
}

/** Writes what a list holds as the neighbours of a point. */
export function keep(found: Neighbours, point: number, list: NearestList): void {
  const base = point * found.each;
  for (let place = 0; place < found.each; place++) {
    found.stations[base + place] = list.stations[place] ?? 0;
    found.km[base + place] = kmOfSquaredChord(list.squaredChords[place] ?? 0);
  }
}

function nearestAmong(
  list: NearestList,
  among: { points: Float64Array; point: number; stations: Float64Array; candidates: Int32Array; count: number },
): void {
  const { points, point, stations, candidates, count } = among;
  const x = points[3 * point] ?? 0;
  const y = points[3 * point + 1] ?? 0;
  const z = points[3 * point + 2] ?? 0;
  list.count = 0;
  let reach = Number.POSITIVE_INFINITY;
  for (let index = 0; index < count; index++) {
    const station = candidates[index] ?? 0;
    const dx = (stations[3 * station] ?? 0) - x;
    const dy = (stations[3 * station + 1] ?? 0) - y;
    const dz = (stations[3 * station + 2] ?? 0) - z;
    const squared = dx * dx + dy * dy + dz * dz;
    if (squared < reach) {
      offer(list, station, squared);
      reach = reachOf(list);
    }
  }
}

type Vector = readonly [x: number, y: number, z: number];

function middleOf(points: Float64Array, start: number, end: number): Vector {
  let [x, y, z] = [0, 0, 0];
  for (let point = start; point < end; point++) {
    x += points[3 * point] ?? 0;
    y += points[3 * point + 1] ?? 0;
    z += points[3 * point + 2] ?? 0;
  }
  const count = Math.max(1, end - start);
  return [x / count, y / count, z / count];
}

function squaredChord(vectors: Float64Array, at: number, [x, y, z]: Vector): number {
  const dx = (vectors[3 * at] ?? 0) - x;
  const dy = (vectors[3 * at + 1] ?? 0) - y;
  const dz = (vectors[3 * at + 2] ?? 0) - z;
  return dx * dx + dy * dy + dz * dz;
}

function radiusOf(points: Float64Array, of: { start: number; end: number; middle: Vector }): number {
  let most = 0;
  for (let point = of.start; point < of.end; point++) most = Math.max(most, squaredChord(points, point, of.middle));
  return Math.sqrt(most);
}
