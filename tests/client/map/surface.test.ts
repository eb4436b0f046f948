import { describe, expect, test } from 'vitest';
import type { SurfaceCells } from '../../../src/contract/surface.ts';
import { contourAt } from '../../../src/map/surface-contours.ts';
import { cornerFigures, cornerPositions, FIGURES_EACH } from '../../../src/map/surface-corners.ts';
import { cellCorners, surfaceHexagons } from '../../../src/map/surface-hexagons.ts';
import { surfaceLines } from '../../../src/map/surface-lines.ts';
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

  test('round a hill close upon themselves: what lies within is a shore, a hollow in it a hole', () => {
    const away = field((x, y) => Math.hypot(x - 12, y - 10));
    const { rings, lines } = contourAt(mesh, away, 4);
    expect(rings.map((ring) => Math.sign(areaOf([[ring]]))).sort()).toEqual([-1, 1]);
    expect(lines).toHaveLength(1);
    const [hole = []] = lines;
    expect(hole[0]).toEqual(hole.at(-1));
    for (const [x = 0, y = 0] of hole) expect(Math.abs(Math.hypot(x - 12, y - 10) - 4)).toBeLessThan(0.15);
    const island = field((x, y) => Math.abs(Math.hypot(x - 12, y - 10) - 3));
    expect(
      contourAt(mesh, island, 1.5)
        .rings.map((ring) => Math.sign(areaOf([[ring]])))
        .sort(),
    ).toEqual([-1, 1, 1]);
  });

  test('stand ten points apart, and nothing is drawn of a surface without scores', () => {
    const { features } = surfaceLines(
      mesh,
      field((x, y) => 3 * x + y),
    );
    expect(new Set(features.map(({ properties }) => properties.value))).toEqual(
      new Set([10, 20, 30, 40, 50, 60, 70, 80]),
    );
    const nothing = surfaceScores(base64(new Int16Array(mesh.cells).fill(-32_768)));
    expect(surfaceLines(mesh, nothing).features).toEqual([]);
    expect(cornerFigures(mesh, nothing).every((figure) => figure === 0)).toBe(true);
    expect([...surfaceScores(base64(Int16Array.of(1234, -32_768)))]).toEqual([expect.closeTo(12.34), Number.NaN]);
  });
});

describe('the corners that are painted', () => {
  const figuresOf = (cell: number, figures: Float32Array) => [
    ...figures.subarray(FIGURES_EACH * cell, FIGURES_EACH * (cell + 1)),
  ];

  test('bring their own score and doubt; on the rim those of their neighbours, and that they hold nothing themselves', () => {
    const scores = field((x) => 3 * x);
    const figures = cornerFigures(mesh, scores);
    let rims = 0;
    for (let cell = 0; cell < mesh.cells; cell++) {
      const [score = 0, held, pale = 0] = figuresOf(cell, figures);
      if (mesh.support[cell] !== 0) {
        expect([score, held, pale]).toEqual([scores[cell], 1, mesh.support[cell] === 1 ? 1 : 0]);
        continue;
      }
      rims += 1;
      expect(held).toBe(0);
      // The middles of two neighbours in a row are a step apart, and so are those of the next row but one.
      if (score !== 0) expect(Math.abs(score - 3 * (mesh.longitudes[cell] ?? 0))).toBeLessThanOrEqual(3.01);
      expect(pale).toBeLessThanOrEqual(1);
    }
    expect(rims).toBe(2 * (COLUMNS + ROWS) - 4);
  });

  test('stand on Mercator’s sheet: 0° N at its middle, 85.0511° N at its upper edge', () => {
    const at = (longitude: number, latitude: number) => {
      const one = { ...mesh, cells: 1, longitudes: Float64Array.of(longitude), latitudes: Float64Array.of(latitude) };
      return [...cornerPositions(one)];
    };
    expect(at(0, 0)).toEqual([0.5, 0.5]);
    expect(at(190, 85.051_129)[0]).toBeCloseTo(370 / 360, 6);
    expect(at(190, 85.051_129)[1]).toBeCloseTo(0, 6);
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
