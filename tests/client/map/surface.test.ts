import { describe, expect, test } from 'vitest';
import type { SurfaceCells } from '../../../src/contract/surface.ts';
import { polygonsOf } from '../../../src/map/ring-polygons.ts';
import { paleArea, surfaceBands } from '../../../src/map/surface-bands.ts';
import { contourAt } from '../../../src/map/surface-contours.ts';
import { cellCorners, surfaceHexagons } from '../../../src/map/surface-hexagons.ts';
import { surfaceMesh, surfaceScores } from '../../../src/map/surface-mesh.ts';

const COLUMNS = 24;
const ROWS = 20;
const base64 = (array: Uint8Array | Uint16Array | Uint32Array | Int16Array) =>
  Buffer.from(array.buffer, array.byteOffset, array.byteLength).toString('base64');

/** A patch of six-cornered cells, a degree apart along a row, every other row half a step along, with an empty rim. */
function patch(supportAt: (column: number, row: number) => number): SurfaceCells {
  const cells = COLUMNS * ROWS;
  const columnOf = (cell: number) => cell % COLUMNS;
  const rowOf = (cell: number) => Math.floor(cell / COLUMNS);
  const isRim = (cell: number) => [0, COLUMNS - 1].includes(columnOf(cell)) || [0, ROWS - 1].includes(rowOf(cell));
  const triangles: number[] = [];
  for (let row = 0; row + 1 < ROWS; row++) {
    for (let column = 0; column + 1 < COLUMNS; column++) {
      const [a, b] = [row * COLUMNS + column, row * COLUMNS + column + 1];
      const [c, d] = [a + COLUMNS, b + COLUMNS];
      // Both turns occur, as they do on the wire.
      triangles.push(...(row % 2 === 0 ? [a, b, c, b, c, d] : [a, b, d, a, c, d]));
    }
  }
  const all = Array.from({ length: cells }, (_none, cell) => cell);
  const x = all.map((cell) => columnOf(cell) + (rowOf(cell) % 2) / 2);
  return {
    cells,
    spacingKm: 100,
    west: 0,
    east: COLUMNS,
    south: 0,
    north: ROWS,
    longitudes: base64(Uint16Array.from(x, (value) => Math.round((65_535 * value) / COLUMNS))),
    latitudes: base64(Uint16Array.from(all, (cell) => Math.round((65_535 * rowOf(cell)) / ROWS))),
    support: base64(Uint8Array.from(all, (cell) => (isRim(cell) ? 0 : supportAt(columnOf(cell), rowOf(cell))))),
    triangles: base64(Uint32Array.from(triangles)),
  };
}

const packed = patch((column) => (column < 10 ? 2 : 1));
const mesh = surfaceMesh(packed);

/** A field of the cells that are not on the rim. */
function field(valueAt: (x: number, y: number) => number): Float32Array {
  return Float32Array.from({ length: mesh.cells }, (_none, cell) =>
    mesh.support[cell] === 0 ? Number.NaN : valueAt(mesh.longitudes[cell] ?? 0, mesh.latitudes[cell] ?? 0),
  );
}

function areaOf(polygons: readonly (readonly (readonly (readonly number[])[])[])[]): number {
  const of = (ring: readonly (readonly number[])[]) =>
    ring.slice(1).reduce((sum, [x = 0, y = 0], at) => {
      const [fromX = 0, fromY = 0] = ring[at] ?? [];
      return sum + (fromX * y - x * fromY) / 2;
    }, 0);
  return polygons.flat().reduce((sum, ring) => sum + of(ring), 0);
}

describe('isopleths across the cells', () => {
  test('of a sloping plane are straight, stand where the plane has their value, and end where the surface does', () => {
    const { lines, rings } = contourAt(
      mesh,
      field((x) => 5 * x),
      60,
    );
    expect(lines).toHaveLength(1);
    expect(rings).toHaveLength(1);
    for (const [x = 0] of lines[0] ?? []) expect(x).toBeCloseTo(12, 2);
    const heights = (lines[0] ?? []).map(([, y = 0]) => y);
    expect(Math.min(...heights)).toBeCloseTo(1, 2);
    expect(Math.max(...heights)).toBeCloseTo(ROWS - 2, 2);
    // All that is at or above lies to the right.
    expect(areaOf([rings])).toBeGreaterThan(0);
  });

  test('round a hill close upon themselves; a hollow is a hole of its band, an island in it a polygon of its own', () => {
    const away = field((x, y) => Math.hypot(x - 12, y - 10));
    const ring = contourAt(mesh, away, 4);
    const [polygon, ...others] = polygonsOf(ring.rings);
    expect(others).toEqual([]);
    expect(polygon).toHaveLength(2);
    expect(ring.lines).toHaveLength(1);
    const [hole = []] = ring.lines;
    expect(hole[0]).toEqual(hole.at(-1));
    for (const [x = 0, y = 0] of hole) expect(Math.abs(Math.hypot(x - 12, y - 10) - 4)).toBeLessThan(0.15);
    const island = field((x, y) => Math.abs(Math.hypot(x - 12, y - 10) - 3));
    const pieces = polygonsOf(contourAt(mesh, island, 1.5).rings);
    expect(pieces.map((rings) => rings.length).sort()).toEqual([1, 2]);
  });

  test('a band holds the next one: their areas fall, and the lowest is the whole surface', () => {
    const scores = field((x, y) => 3 * x + y);
    const { bands, lines } = surfaceBands(mesh, scores);
    const areas = bands.features.map(({ geometry }) => areaOf(geometry.coordinates));
    expect(bands.features.map(({ properties }) => properties.from)).toEqual([0, 10, 20, 30, 40, 50, 60, 70, 80]);
    expect(areas).toEqual(areas.toSorted((one, other) => other - one));
    // A square unit for each cell that is not of the rim, less the corners that the outline cuts.
    expect(areas[0]).toBeLessThan((COLUMNS - 2) * (ROWS - 2) + 1);
    expect(areas[0]).toBeGreaterThan(0.95 * (COLUMNS - 2) * (ROWS - 2));
    expect(new Set(lines.features.map(({ properties }) => properties.value))).toEqual(
      new Set([10, 20, 30, 40, 50, 60, 70, 80]),
    );
  });

  test('the weave covers what is pale, and stops half way to what is not', () => {
    const { coordinates } = paleArea(mesh).geometry;
    expect(coordinates).toHaveLength(1);
    const xs = coordinates.flat(2).map(([x = 0]) => x);
    expect(Math.min(...xs)).toBeGreaterThanOrEqual(9.4);
    const full = surfaceMesh(patch(() => 2));
    expect(paleArea(full).geometry.coordinates).toEqual([]);
  });

  test('nothing is drawn of a surface without scores', () => {
    const nothing = base64(new Int16Array(mesh.cells).fill(-32_768));
    expect(surfaceBands(mesh, surfaceScores(nothing)).bands.features).toEqual([]);
    expect([...surfaceScores(base64(Int16Array.of(1234, -32_768)))]).toEqual([expect.closeTo(12.34), Number.NaN]);
  });
});

describe('the cells themselves', () => {
  test('are closed, six-cornered, and stand round their middle; only those in the box are made', () => {
    const scores = field((x) => x);
    const box = { west: 4.9, east: 6.1, south: 4.9, north: 6.1 };
    const { features } = surfaceHexagons(mesh, { corners: cellCorners(mesh), scores, box });
    expect(features).toHaveLength(3);
    for (const { geometry, properties } of features) {
      const [ring = []] = geometry.coordinates;
      expect(ring).toHaveLength(7);
      expect(ring[0]).toEqual(ring.at(-1));
      const middle = ring.slice(1).reduce((sum, [x = 0]) => sum + x / 6, 0);
      expect(properties.score).toBeCloseTo(middle, 2);
      expect(areaOf([[ring]])).toBeCloseTo(1, 1);
    }
  });
});
