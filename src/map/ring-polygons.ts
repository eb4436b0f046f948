import type { Position } from 'geojson';

type Ring = readonly Position[];

interface Shore {
  readonly ring: Ring;
  readonly area: number;
  readonly box: readonly [west: number, south: number, east: number, north: number];
  readonly holes: Ring[];
}

/** Rings as polygons: each counter-clockwise one with the clockwise ones that lie in it and in no smaller one. */
export function polygonsOf(rings: readonly Ring[]): Position[][][] {
  const shores: Shore[] = [];
  const holes: Ring[] = [];
  for (const ring of rings) {
    const area = signedArea(ring);
    if (area > 0) shores.push({ ring, area, box: boxOf(ring), holes: [] });
    else if (area < 0) holes.push(ring);
  }
  shores.sort((one, other) => one.area - other.area);
  for (const hole of holes) {
    const [point] = hole;
    if (point !== undefined) shores.find((shore) => isInside(point, shore))?.holes.push(hole);
  }
  return shores.map((shore) => [[...shore.ring], ...shore.holes.map((hole) => [...hole])]);
}

function signedArea(ring: Ring): number {
  let sum = 0;
  for (let at = 0; at + 1 < ring.length; at++) {
    const [x, y] = pointAt(ring, at);
    const [nextX, nextY] = pointAt(ring, at + 1);
    sum += x * nextY - nextX * y;
  }
  return sum / 2;
}

function boxOf(ring: Ring): Shore['box'] {
  let [west, south, east, north] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const [x = 0, y = 0] of ring) {
    west = Math.min(west, x);
    east = Math.max(east, x);
    south = Math.min(south, y);
    north = Math.max(north, y);
  }
  return [west, south, east, north];
}

function isInside([x = 0, y = 0]: Position, { ring, box }: Shore): boolean {
  const [west, south, east, north] = box;
  if (x < west || x > east || y < south || y > north) return false;
  let inside = false;
  for (let at = 0; at + 1 < ring.length; at++) {
    const [ax, ay] = pointAt(ring, at);
    const [bx, by] = pointAt(ring, at + 1);
    if (ay > y !== by > y && x < ((bx - ax) * (y - ay)) / (by - ay) + ax) inside = !inside;
  }
  return inside;
}

function pointAt(ring: Ring, at: number): readonly [x: number, y: number] {
  const point = ring[at];
  return [point?.[0] ?? 0, point?.[1] ?? 0];
}
