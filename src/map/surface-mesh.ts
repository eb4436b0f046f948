/**
 * The cells of a surface as a mesh: their middles are its corners, every three cells that touch make a triangle. Isopleths are drawn
 * across these triangles, exact at every cell; there is no second lattice to be laid over the cells and no library for it.
 */
import type { SurfaceCells } from '../contract/surface.ts';
import { base64Bytes } from '../lib/base64-bytes.ts';

export interface SurfaceMesh {
  readonly cells: number;
  /** Degrees; the outermost cells. */
  readonly west: number;
  readonly east: number;
  /** Degrees; longitudes run on past 180 where the surface crosses it. */
  readonly longitudes: Float64Array;
  readonly latitudes: Float64Array;
  /** 2 full, 1 pale, 0 none: the rim. */
  readonly support: Uint8Array;
  /** Three corners each, counter-clockwise with north up. */
  readonly triangles: Uint32Array<ArrayBuffer>;
  /** Number of the edge from each corner of `triangles` to the next one; two triangles share it. */
  readonly edges: Uint32Array;
  readonly edgeCount: number;
}

const STEPS = 65_535;

export function surfaceMesh(packed: SurfaceCells): SurfaceMesh {
  const { west, east, south, north } = packed;
  const longitudes = spread(packed.longitudes, west, east);
  const latitudes = spread(packed.latitudes, south, north);
  const triangles = new Uint32Array(base64Bytes(packed.triangles).buffer);
  turnCounterClockwise(triangles, longitudes, latitudes);
  const { edges, edgeCount } = numberEdges(triangles, packed.cells);
  return {
    cells: packed.cells,
    west,
    east,
    longitudes,
    latitudes,
    support: base64Bytes(packed.support),
    triangles,
    edges,
    edgeCount,
  };
}

/** Scores of the cells in points; NaN where there is none. */
export function surfaceScores(packed: string): Float32Array {
  const hundredths = new Int16Array(base64Bytes(packed).buffer);
  return Float32Array.from(hundredths, (value) => (value === NO_SCORE ? Number.NaN : value / 100));
}

const NO_SCORE = -32_768;

function spread(packed: string, least: number, greatest: number): Float64Array {
  const shares = new Uint16Array(base64Bytes(packed).buffer);
  return Float64Array.from(shares, (share) => least + ((greatest - least) * share) / STEPS);
}

function turnCounterClockwise(triangles: Uint32Array, x: Float64Array, y: Float64Array): void {
  for (let at = 0; at < triangles.length; at += 3) {
    const [a, b, c] = [triangles[at] ?? 0, triangles[at + 1] ?? 0, triangles[at + 2] ?? 0];
    const [ax, ay] = [x[a] ?? 0, y[a] ?? 0];
    const turn = ((x[b] ?? 0) - ax) * ((y[c] ?? 0) - ay) - ((x[c] ?? 0) - ax) * ((y[b] ?? 0) - ay);
    if (turn >= 0) continue;
    triangles[at + 1] = c;
    triangles[at + 2] = b;
  }
}

function numberEdges(triangles: Uint32Array, cells: number): { edges: Uint32Array; edgeCount: number } {
  const numbers = new Map<number, number>();
  const edges = new Uint32Array(triangles.length);
  for (let at = 0; at < triangles.length; at++) {
    const from = triangles[at] ?? 0;
    const to = triangles[at % 3 === 2 ? at - 2 : at + 1] ?? 0;
    const key = from < to ? from * cells + to : to * cells + from;
    const known = numbers.get(key);
    edges[at] = known ?? numbers.size;
    if (known === undefined) numbers.set(key, numbers.size);
  }
  return { edges, edgeCount: numbers.size };
}
