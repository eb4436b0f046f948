import type { Neighbours } from './nearest-stations.ts';

/**
 * Shares of the neighbours of every point in its estimate: inverse distance, w = km^-power over their sum (Shepard 1968). A
 * point at a station is that station's alone.
 * @returns laid out as the neighbours are; those of a point add up to 1
 */
export function distanceWeights({ points, each, km }: Neighbours, power: number): Float32Array {
  const weights = new Float32Array(points * each);
  for (let point = 0; point < points; point++) {
    const base = point * each;
    // Nearest first: at a distance of 0 the first of them is the station itself.
    if ((km[base] ?? 0) === 0) {
      if (each > 0) weights[base] = 1;
      continue;
    }
    // Relative to the nearest, so that no power overflows.
    const nearest = km[base] ?? 1;
    let sum = 0;
    for (let at = base; at < base + each; at++) {
      const weight = (nearest / (km[at] ?? 1)) ** power;
      weights[at] = weight;
      sum += weight;
    }
    for (let at = base; at < base + each; at++) weights[at] = (weights[at] ?? 0) / sum;
  }
  return weights;
}
