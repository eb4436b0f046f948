/** The default station of many sites at once (method 8): the first of `rankStations` without ranking the rest. */
import { EARTH_RADIUS_KM, type Position } from './great-circle-km.ts';
import {
  choiceOf,
  isBefore,
  KM_PER_FIGURE,
  M_PER_FIGURE,
  type SiteToServe,
  type StationChoice,
  type StationToChoose,
} from './station-choice.ts';

/** @returns null when there is no station */
export type StationFinder = (site: SiteToServe) => StationChoice | null;

const KM_PER_M = KM_PER_FIGURE / M_PER_FIGURE;
const RADIANS_PER_DEGREE = Math.PI / 180;
/** A chord is never longer than its arc; what rounding adds to it stays below this, km. */
const ROUNDING_KM = 1e-6;

/**
 * Lays the stations out once by their height above the plane of the equator, as points in space, km. A site looks outward from its own
 * plane and stops where the planes alone are further away than what it has found; only stations that the chord and their height
 * leave have their arc computed. The answer equals the first of `rankStations`, ties included.
 * @param stations those with a usable year
 */
export function makeStationFinder(stations: readonly StationToChoose[]): StationFinder {
  const placed = stations.map((station) => ({ station, point: pointOf(station) }));
  placed.sort((one, other) => one.point.z - other.point.z);
  const xs = Float64Array.from(placed, ({ point }) => point.x);
  const ys = Float64Array.from(placed, ({ point }) => point.y);
  const zs = Float64Array.from(placed, ({ point }) => point.z);
  const heightsM = Float64Array.from(placed, ({ station }) => station.elevationM);
  return (site) => {
    const { x, y, z } = pointOf(site);
    const heightM = site.elevationM ?? Number.NaN;
    let best: StationChoice | null = null;
    let withinKm = Number.POSITIVE_INFINITY;
    let below = firstNotUnder(zs, z) - 1;
    let above = below + 1;
    while (below >= 0 || above < zs.length) {
      const downKm = below >= 0 ? z - (zs[below] ?? 0) : Number.POSITIVE_INFINITY;
      const upKm = above < zs.length ? (zs[above] ?? 0) - z : Number.POSITIVE_INFINITY;
      if (Math.min(downKm, upKm) > withinKm) break;
      const index = downKm <= upKm ? below-- : above++;
      const xKm = (xs[index] ?? 0) - x;
      const yKm = (ys[index] ?? 0) - y;
      const zKm = (zs[index] ?? 0) - z;
      const chordKm2 = xKm * xKm + yKm * yKm + zKm * zKm;
      if (chordKm2 > withinKm * withinKm) continue;
      // A metre of height weighs as some way further off; where the site's height is not known, NaN fails the comparison.
      const heightKm = Math.abs((heightsM[index] ?? 0) - heightM) * KM_PER_M;
      if (Math.sqrt(chordKm2) + heightKm > withinKm) continue;
      const station = placed[index]?.station;
      if (station === undefined) continue;
      const choice = choiceOf(site, station);
      if (best !== null && !isBefore(choice, best)) continue;
      best = choice;
      withinKm = choice.figure * KM_PER_FIGURE + ROUNDING_KM;
    }
    return best;
  };
}

function pointOf({ latitude, longitude }: Position): { x: number; y: number; z: number } {
  const north = latitude * RADIANS_PER_DEGREE;
  const east = longitude * RADIANS_PER_DEGREE;
  const fromAxisKm = EARTH_RADIUS_KM * Math.cos(north);
  return { x: fromAxisKm * Math.cos(east), y: fromAxisKm * Math.sin(east), z: EARTH_RADIUS_KM * Math.sin(north) };
}

/** Index of the first value that is not under `wanted`, in ascending order. */
function firstNotUnder(sorted: Float64Array, wanted: number): number {
  let low = 0;
  let high = sorted.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((sorted[middle] ?? 0) < wanted) low = middle + 1;
    else high = middle;
  }
  return low;
}
