/** Where a field over a mesh passes a threshold: the outline of all that lies at or above it. */
import type { Position } from 'geojson';
import type { SurfaceMesh } from './surface-mesh.ts';

export interface Contour {
  /** Closed, what is inside on the left: shores counter-clockwise, holes clockwise. The last point repeats the first. */
  readonly rings: readonly (readonly Position[])[];
  /** The parts of the rings where the field itself passes the threshold, not where the surface ends. */
  readonly lines: readonly (readonly Position[])[];
}

const NONE = -1;

/**
 * @param field a value for each cell; NaN: nothing, and the outline runs half way to it
 * @param threshold cells of at least this are inside
 */
export function contourAt(mesh: SurfaceMesh, field: ArrayLike<number>, threshold: number): Contour {
  const { next, started } = segmentsAt(mesh, field, threshold);
  const rings: Position[][] = [];
  const lines: Position[][] = [];
  for (const start of started) {
    if (next.edges[start] === NONE) continue;
    const crossings: Crossing[] = [];
    let edge = start;
    while (edge !== NONE && next.edges[edge] !== NONE) {
      crossings.push(crossingOf(mesh, field, { threshold, corner: next.corners[edge] ?? 0 }));
      const following = next.edges[edge] ?? NONE;
      next.edges[edge] = NONE;
      edge = following;
    }
    const [first] = crossings;
    if (first === undefined) continue;
    rings.push([...crossings, first].map(({ point }) => point));
    lines.push(...linesOf(crossings));
  }
  return { rings, lines };
}

interface Links {
  /** By edge: the edge to which the outline goes on from it; NONE where it does not pass. */
  readonly edges: Int32Array;
  /** By edge: the corner of a triangle from which it runs to the next one. */
  readonly corners: Int32Array;
}

/** One link per triangle that the outline crosses: in by one edge, out by another. */
function segmentsAt(
  { triangles, edges, edgeCount }: SurfaceMesh,
  field: ArrayLike<number>,
  threshold: number,
): { next: Links; started: number[] } {
  const next = { edges: new Int32Array(edgeCount).fill(NONE), corners: new Int32Array(edgeCount).fill(NONE) };
  const started: number[] = [];
  for (let at = 0; at < triangles.length; at += 3) {
    const a = (field[triangles[at] ?? 0] ?? Number.NaN) >= threshold;
    const b = (field[triangles[at + 1] ?? 0] ?? Number.NaN) >= threshold;
    const c = (field[triangles[at + 2] ?? 0] ?? Number.NaN) >= threshold;
    if (a === b && b === c) continue;
    // The corner that differs from both others; its own edge leads to the next corner, that of the one before leads to it.
    const lone = a === b ? 2 : a === c ? 1 : 0;
    const out = at + lone;
    const back = at + ((lone + 2) % 3);
    const isInside = lone === 0 ? a : lone === 1 ? b : c;
    const [from, to] = isInside ? [out, back] : [back, out];
    const fromEdge = edges[from] ?? 0;
    next.edges[fromEdge] = edges[to] ?? 0;
    next.corners[fromEdge] = from;
    started.push(fromEdge);
  }
  return { next, started };
}

interface Crossing {
  readonly point: Position;
  /** Half way to a cell without a value: the end of the surface, not a passing of the threshold. */
  readonly isEnd: boolean;
}

function crossingOf(mesh: SurfaceMesh, field: ArrayLike<number>, at: { threshold: number; corner: number }): Crossing {
  const { triangles, longitudes, latitudes } = mesh;
  const { threshold, corner } = at;
  const one = triangles[corner] ?? 0;
  const other = triangles[corner % 3 === 2 ? corner - 2 : corner + 1] ?? 0;
  const [from, to] = [field[one] ?? Number.NaN, field[other] ?? Number.NaN];
  const isEnd = Number.isNaN(from) || Number.isNaN(to);
  const share = isEnd ? 0.5 : (threshold - from) / (to - from);
  const [x, y] = [longitudes[one] ?? 0, latitudes[one] ?? 0];
  return {
    point: [x + share * ((longitudes[other] ?? 0) - x), y + share * ((latitudes[other] ?? 0) - y)],
    isEnd,
  };
}

/** A ring without its ends, in as many pieces as they leave. */
function linesOf(crossings: readonly Crossing[]): Position[][] {
  const firstEnd = crossings.findIndex(({ isEnd }) => isEnd);
  if (firstEnd === -1) return [[...crossings, ...crossings.slice(0, 1)].map(({ point }) => point)];
  const lines: Position[][] = [];
  let line: Position[] = [];
  for (const { point, isEnd } of [...crossings.slice(firstEnd), ...crossings.slice(0, firstEnd + 1)]) {
    if (!isEnd) {
      line.push(point);
      continue;
    }
    if (line.length > 1) lines.push(line);
    line = [];
  }
  return lines;
}
