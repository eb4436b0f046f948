/** A surface as the corners of its triangles, ready to be painted. Pure. */
import type { SurfaceMesh } from './surface-mesh.ts';

/** Numbers to a corner in `cornerFigures`: score in points, 1 where there is one, 1 where stations are far. */
export const FIGURES_EACH = 3;
const PALE = 1;

/** Where each cell lies on Mercator's sheet: x, y; 0 to 1 across and down, x running on past 1 as longitudes do past 180. */
export function cornerPositions({ cells, longitudes, latitudes }: SurfaceMesh): Float32Array<ArrayBuffer> {
  const positions = new Float32Array(2 * cells);
  for (let cell = 0; cell < cells; cell++) {
    const latitude = ((latitudes[cell] ?? 0) * Math.PI) / 180;
    positions[2 * cell] = ((longitudes[cell] ?? 0) + 180) / 360;
    positions[2 * cell + 1] = (1 - Math.asinh(Math.tan(latitude)) / Math.PI) / 2;
  }
  return positions;
}

/**
 * What each cell brings to the triangles between it and its neighbours. A cell without a score takes those of its neighbours and
 * has 0 in the second place, so that half way to it the surface ends at its full figure.
 */
export function cornerFigures(mesh: SurfaceMesh, scores: Float32Array): Float32Array<ArrayBuffer> {
  const { cells, support, triangles } = mesh;
  const figures = new Float32Array(FIGURES_EACH * cells);
  const counts = new Uint16Array(cells);
  for (let cell = 0; cell < cells; cell++) {
    const score = scores[cell] ?? Number.NaN;
    if (Number.isNaN(score)) continue;
    figures.set([score, 1, support[cell] === PALE ? 1 : 0], FIGURES_EACH * cell);
  }
  const lend = (from: number, to: number) => {
    if (figures[FIGURES_EACH * from + 1] !== 1 || figures[FIGURES_EACH * to + 1] !== 0) return;
    counts[to] = (counts[to] ?? 0) + 1;
    for (const at of [0, 2]) {
      const place = FIGURES_EACH * to + at;
      figures[place] = (figures[place] ?? 0) + (figures[FIGURES_EACH * from + at] ?? 0);
    }
  };
  for (let at = 0; at < triangles.length; at++) {
    const from = triangles[at] ?? 0;
    const to = triangles[at % 3 === 2 ? at - 2 : at + 1] ?? 0;
    lend(from, to);
    lend(to, from);
  }
  for (let cell = 0; cell < cells; cell++) {
    const count = counts[cell] ?? 0;
    if (count === 0) continue;
    for (const at of [0, 2]) {
      const place = FIGURES_EACH * cell + at;
      figures[place] = (figures[place] ?? 0) / count;
    }
  }
  return figures;
}
