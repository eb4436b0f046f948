import type { PolygonRings, Position, Ring } from './read-atlas.ts';

/** A label is wider than it is high: room to the sides counts less than room above and below by this factor. */
const LABEL_STRETCH = 2;
/** Grid steps across the shape at each of the passes; each pass looks closer around the best point of the last. */
const STEPS = 14;
const PASSES = 4;

/**
 * A point well inside a polygon, where a wide label fits best: among the points of a grid, refined around the best one,
 * that which lies farthest from the outline, with the sides squeezed by `LABEL_STRETCH`.
 */
export function interiorPoint(polygon: PolygonRings): Position {
  const outer = polygon[0] ?? [];
  const outline = outlineOf(polygon);
  const longitudes = outer.map((position) => position[0]);
  const latitudes = outer.map((position) => position[1]);
  let west = Math.min(...longitudes);
  let east = Math.max(...longitudes);
  let south = Math.min(...latitudes);
  let north = Math.max(...latitudes);
  let best: { position: Position; room: number } = { position: [(west + east) / 2, (south + north) / 2], room: -1 };
  const aspect = Math.cos((((south + north) / 2) * Math.PI) / 180) / LABEL_STRETCH;
  for (let pass = 0; pass < PASSES; pass += 1) {
    const stepX = (east - west) / STEPS;
    const stepY = (north - south) / STEPS;
    for (let row = 0; row <= STEPS; row += 1) {
      for (let column = 0; column <= STEPS; column += 1) {
        const position: Position = [west + column * stepX, south + row * stepY];
        const room = roomAround(outline, { position, aspect, enough: best.room });
        if (room > best.room && contains(polygon, position)) best = { position, room };
      }
    }
    [west, east] = [best.position[0] - 2 * stepX, best.position[0] + 2 * stepX];
    [south, north] = [best.position[1] - 2 * stepY, best.position[1] + 2 * stepY];
  }
  return best.position;
}

/** Whether a position lies inside a polygon and outside its holes (even-odd rule). */
export function contains(polygon: PolygonRings, [x, y]: Position): boolean {
  const { west, east, south, north } = boxOf(polygon);
  if (x < west || x > east || y < south || y > north) return false;
  let inside = false;
  for (const [a, b] of segments(polygon)) {
    if (a[1] > y !== b[1] > y && x < ((b[0] - a[0]) * (y - a[1])) / (b[1] - a[1]) + a[0]) inside = !inside;
  }
  return inside;
}

interface Box {
  readonly west: number;
  readonly east: number;
  readonly south: number;
  readonly north: number;
}

/** Of thousands of polygons nearly all are ruled out by their box, which is found once. */
const boxes = new WeakMap<PolygonRings, Box>();

function boxOf(polygon: PolygonRings): Box {
  const known = boxes.get(polygon);
  if (known !== undefined) return known;
  let [west, east, south, north] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const [x, y] of polygon[0] ?? []) {
    west = Math.min(west, x);
    east = Math.max(east, x);
    south = Math.min(south, y);
    north = Math.max(north, y);
  }
  const box = { west, east, south, north };
  boxes.set(polygon, box);
  return box;
}

/** Degrees of longitude from the first outline west of a position to the first one east of it. */
export function chordDegrees(polygon: PolygonRings, [x, y]: Position): number {
  let west = Number.NEGATIVE_INFINITY;
  let east = Number.POSITIVE_INFINITY;
  for (const [a, b] of segments(polygon)) {
    if (a[1] > y === b[1] > y) continue;
    const crossing = ((b[0] - a[0]) * (y - a[1])) / (b[1] - a[1]) + a[0];
    if (crossing <= x) west = Math.max(west, crossing);
    else east = Math.min(east, crossing);
  }
  return east - west;
}

/** Area of a ring on the globe in steradians (sum of spherical trapezia), for telling large from small. */
export function areaOf(ring: Ring): number {
  const radians = Math.PI / 180;
  let doubled = 0;
  for (const [index, a] of ring.entries()) {
    const b = ring[index + 1] ?? ring[0] ?? a;
    doubled += (b[0] - a[0]) * radians * (Math.sin(a[1] * radians) + Math.sin(b[1] * radians));
  }
  return Math.abs(doubled) / 2;
}

type Room = { readonly position: Position; readonly aspect: number; readonly enough: number };

/** x and y of both ends of every segment, one after the other: the search below looks at each of them thousands of times. */
type Outline = Float64Array;

function outlineOf(polygon: PolygonRings): Outline {
  return Float64Array.from([...segments(polygon)].flat(2));
}

/** Squared distance to the outline; given up, with what was found, once it is no more than `enough`. */
function roomAround(outline: Outline, { position: [x, y], aspect, enough }: Room): number {
  let nearest = Number.POSITIVE_INFINITY;
  for (let at = 0; at < outline.length; at += 4) {
    const ax = outline[at] ?? 0;
    const ay = outline[at + 1] ?? 0;
    const bx = outline[at + 2] ?? 0;
    const by = outline[at + 3] ?? 0;
    const dx = (bx - ax) * aspect;
    const dy = by - ay;
    const px = (x - ax) * aspect;
    const py = y - ay;
    const length = dx * dx + dy * dy;
    const along = length === 0 ? 0 : Math.max(0, Math.min(1, (px * dx + py * dy) / length));
    nearest = Math.min(nearest, (px - along * dx) ** 2 + (py - along * dy) ** 2);
    if (nearest <= enough) return nearest;
  }
  return nearest;
}

function* segments(polygon: PolygonRings): Generator<readonly [Position, Position]> {
  for (const ring of polygon) {
    for (let index = 1; index < ring.length; index += 1) {
      const a = ring[index - 1];
      const b = ring[index];
      if (a !== undefined && b !== undefined) yield [a, b];
    }
  }
}
