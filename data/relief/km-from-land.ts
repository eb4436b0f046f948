import { FARTHEST_TOLD_KM } from '#engine/weather-files/relief.ts';
import type { Position, Ring } from '../basemap/read-atlas.ts';
import { NODES_PER_DEGREE, nodeAt, ROWS } from './world-grid.ts';

/** A degree of latitude on a sphere of the mean radius of the Earth, 6371.0088 km. */
const KM_PER_DEGREE = 111.195;
/** Coasts are followed in steps of this length. */
const STEP_KM = 1.5;

/** Distance of every node from land, km: 0 on land, `FARTHEST_TOLD_KM` for anything further. */
export function kmFromLand(land: Uint8Array, coasts: readonly Ring[]): Float32Array {
  const km = Float32Array.from(land, (isLand) => (isLand === 1 ? 0 : FARTHEST_TOLD_KM));
  for (const coast of coasts) {
    for (let at = 1; at < coast.length; at++) {
      const from = coast[at - 1];
      const to = coast[at];
      if (from !== undefined && to !== undefined) followSegment(km, from, to);
    }
  }
  return km;
}

function followSegment(km: Float32Array, from: Position, to: Position): void {
  const east = (to[0] - from[0]) * Math.cos((from[1] * Math.PI) / 180);
  const steps = Math.max(1, Math.ceil((Math.hypot(east, to[1] - from[1]) * KM_PER_DEGREE) / STEP_KM));
  for (let step = 0; step <= steps; step++) {
    const share = step / steps;
    lower(km, [from[0] + share * (to[0] - from[0]), from[1] + share * (to[1] - from[1])]);
  }
}

/** Lowers the distance of the nodes about a point of the coast. */
function lower(km: Float32Array, [longitude, latitude]: Position): void {
  const reach = FARTHEST_TOLD_KM / KM_PER_DEGREE;
  const first = Math.max(0, Math.ceil((latitude - reach + 90) * NODES_PER_DEGREE));
  const last = Math.min(ROWS - 1, Math.floor((latitude + reach + 90) * NODES_PER_DEGREE));
  for (let row = first; row <= last; row++) {
    const north = (row / NODES_PER_DEGREE - 90 - latitude) * KM_PER_DEGREE;
    // Wide enough of the poles; nearer to them there is no land but Antarctica, which reaches the pole.
    const kmPerDegree = KM_PER_DEGREE * Math.max(0.05, Math.cos(((row / NODES_PER_DEGREE - 90) * Math.PI) / 180));
    const half = Math.sqrt(FARTHEST_TOLD_KM ** 2 - north ** 2) / kmPerDegree;
    const west = Math.ceil((longitude - half) * NODES_PER_DEGREE);
    const east = Math.floor((longitude + half) * NODES_PER_DEGREE);
    for (let column = west; column <= east; column++) {
      const node = nodeAt(row, column);
      const away = Math.hypot(north, (column / NODES_PER_DEGREE - longitude) * kmPerDegree);
      if (away < (km[node] ?? 0)) km[node] = away;
    }
  }
}
