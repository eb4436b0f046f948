import type { FeatureCollection, Polygon, Position } from 'geojson';
import type { SurfaceMesh } from './surface-mesh.ts';

export interface HexagonProperties {
  readonly score: number;
  readonly pale: boolean;
}

type Box = Readonly<Record<'west' | 'south' | 'east' | 'north', number>>;

/** The triangles around each cell: those of cell i stand from starts[i] to starts[i + 1]. */
export interface CellCorners {
  readonly starts: Uint32Array;
  readonly triangles: Uint32Array;
}

/** A corner of a cell is the middle of the triangle between it and two neighbours. */
export function cellCorners({ cells, triangles }: SurfaceMesh): CellCorners {
  const starts = new Uint32Array(cells + 1);
  for (const cell of triangles) starts[cell + 1] = (starts[cell + 1] ?? 0) + 1;
  for (let cell = 0; cell < cells; cell++) starts[cell + 1] = (starts[cell + 1] ?? 0) + (starts[cell] ?? 0);
  const filled = starts.slice();
  const around = new Uint32Array(triangles.length);
  for (let at = 0; at < triangles.length; at++) {
    const cell = triangles[at] ?? 0;
    const place = filled[cell] ?? 0;
    around[place] = Math.floor(at / 3);
    filled[cell] = place + 1;
  }
  return { starts, triangles: around };
}

/** The cells in a view as polygons; a margin of a cell beyond it is left to the caller. */
export function surfaceHexagons(
  mesh: SurfaceMesh,
  drawn: { corners: CellCorners; scores: Float32Array; box: Box },
): FeatureCollection<Polygon, HexagonProperties> {
  const { corners, scores, box } = drawn;
  const features: FeatureCollection<Polygon, HexagonProperties>['features'] = [];
  for (let cell = 0; cell < mesh.cells; cell++) {
    const score = scores[cell] ?? Number.NaN;
    const [x, y] = [mesh.longitudes[cell] ?? 0, mesh.latitudes[cell] ?? 0];
    if (Number.isNaN(score) || x < box.west || x > box.east || y < box.south || y > box.north) continue;
    const ring = ringOf(mesh, { corners, cell });
    features.push({
      type: 'Feature',
      properties: { score, pale: mesh.support[cell] === 1 },
      geometry: { type: 'Polygon', coordinates: [ring] },
    });
  }
  return { type: 'FeatureCollection', features };
}

function ringOf(mesh: SurfaceMesh, { corners, cell }: { corners: CellCorners; cell: number }): Position[] {
  const { triangles, longitudes, latitudes } = mesh;
  const [middleX, middleY] = [longitudes[cell] ?? 0, latitudes[cell] ?? 0];
  const around: { point: Position; turn: number }[] = [];
  for (let at = corners.starts[cell] ?? 0; at < (corners.starts[cell + 1] ?? 0); at++) {
    const first = 3 * (corners.triangles[at] ?? 0);
    let [x, y] = [0, 0];
    for (let corner = first; corner < first + 3; corner++) {
      x += (longitudes[triangles[corner] ?? 0] ?? 0) / 3;
      y += (latitudes[triangles[corner] ?? 0] ?? 0) / 3;
    }
    around.push({ point: [x, y], turn: Math.atan2(y - middleY, x - middleX) });
  }
  const ring = around.sort((one, other) => one.turn - other.turn).map(({ point }) => point);
  return [...ring, ...ring.slice(0, 1)];
}
