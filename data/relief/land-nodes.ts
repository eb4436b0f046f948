import type { PolygonRings, Ring } from '../basemap/read-atlas.ts';
import { NODES_PER_DEGREE, nodeAt, ROWS } from './world-grid.ts';

/** 1 where a node lies on land, by the polygons of the base map. */
export function landNodes(polygons: readonly PolygonRings[]): Uint8Array {
  const land = new Uint8Array(ROWS * 360 * NODES_PER_DEGREE);
  for (const rings of polygons) {
    const crossings = crossingsByRow(rings);
    for (const [row, longitudes] of crossings) {
      longitudes.sort((a, b) => a - b);
      // Between an odd and an even crossing lies land.
      for (let at = 0; at + 1 < longitudes.length; at += 2) {
        const west = Math.ceil((longitudes[at] ?? 0) * NODES_PER_DEGREE);
        const east = Math.floor((longitudes[at + 1] ?? 0) * NODES_PER_DEGREE);
        for (let column = west; column <= east; column++) land[nodeAt(row, column)] = 1;
      }
    }
  }
  return land;
}

/** Longitudes at which the rings of a polygon cross the parallel of each row. */
function crossingsByRow(rings: PolygonRings): Map<number, number[]> {
  const crossings = new Map<number, number[]>();
  for (const ring of rings) for (let at = 1; at < ring.length; at++) addCrossings(crossings, ring, at);
  return crossings;
}

function addCrossings(crossings: Map<number, number[]>, ring: Ring, at: number): void {
  const [fromLongitude, fromLatitude] = ring[at - 1] ?? [0, 0];
  const [toLongitude, toLatitude] = ring[at] ?? [0, 0];
  const from = (fromLatitude + 90) * NODES_PER_DEGREE;
  const to = (toLatitude + 90) * NODES_PER_DEGREE;
  // A corner on the parallel belongs to the segment above it alone.
  for (let row = Math.ceil(Math.min(from, to)); row < Math.max(from, to); row++) {
    const share = (row - from) / (to - from);
    const longitudes = crossings.get(row) ?? [];
    longitudes.push(fromLongitude + share * (toLongitude - fromLongitude));
    crossings.set(row, longitudes);
  }
}
