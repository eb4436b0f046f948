/** The ground of a surface: all of it that follows from where the stations are, before any figure. Made in a thread. */
import * as h3 from 'h3-js';
import { type Neighbours, nearestStations } from '#engine/interpolation/nearest-stations.ts';
import { nearestOthers } from '#engine/interpolation/other-stations.ts';
import { columnsOf, unitVectors } from '#engine/interpolation/sphere-vectors.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import type { SurfaceGrid, SurfaceTask } from '../../jobs/web-task.ts';
import { type SurfaceCells, surfaceCells } from './surface-cells.ts';

/** Stations that an estimate rests on. */
export const NEAREST_STATIONS = 8;
/** Cells are grouped by the parent so many steps above them, some fifty to a group. */
const PARENT_STEPS = 2;

/** @param task.stations at least one */
export function makeSurfaceGrid({ stations }: SurfaceTask, relief: Relief): SurfaceGrid {
  const cells = surfaceCells(stations, relief);
  const vectors = unitVectors(columnsOf(stations));
  return {
    spacingKm: cells.spacingKm,
    latitudes: Float32Array.from(cells.latitudes),
    longitudes: Float32Array.from(aroundStations(cells.longitudes, stations)),
    support: cells.support,
    triangles: trianglesBetween(cells),
    elevationsM: cells.elevationsM,
    held: cells.held,
    neighbours: neighboursOf(cells, vectors),
    others: nearestOthers(vectors, NEAREST_STATIONS),
  };
}

function neighboursOf(cells: SurfaceCells, stations: Float64Array): Neighbours {
  const parents = cells.ids.map((id) => h3.cellToParent(id, cells.resolution - PARENT_STEPS));
  const starts = parents.flatMap((parent, index) => (parent === parents[index - 1] ? [] : [index]));
  return nearestStations({
    points: unitVectors(cells),
    groupStarts: Uint32Array.of(...starts, cells.ids.length),
    stations,
    each: NEAREST_STATIONS,
  });
}

/**
 * Longitudes run on past 180° rather than break off, where the stations lie about the date line: all within half a turn of the
 * middle of the stations.
 */
function aroundStations(
  longitudes: Float64Array,
  stations: readonly { readonly longitude: number }[],
): readonly number[] {
  const turn = (longitude: number) => (longitude * Math.PI) / 180;
  const x = stations.reduce((sum, { longitude }) => sum + Math.cos(turn(longitude)), 0);
  const y = stations.reduce((sum, { longitude }) => sum + Math.sin(turn(longitude)), 0);
  const middle = (Math.atan2(y, x) * 180) / Math.PI;
  return [...longitudes].map((longitude) => {
    const away = longitude - middle;
    return longitude - 360 * Math.round(away / 360);
  });
}

/** Every three cells that touch one another, as numbers of cells, three by three: what isopleths are drawn across. */
function trianglesBetween({ ids, support }: SurfaceCells): Uint32Array {
  const numbers = new Map(ids.map((id, number) => [id, number]));
  const near = ids.map((id) =>
    h3
      .gridDisk(id, 1)
      .flatMap((each) => (each === id ? [] : (numbers.get(each) ?? [])))
      .sort((one, other) => one - other),
  );
  const triangles: number[] = [];
  for (const [first, all] of near.entries()) {
    const later = all.filter((number) => number > first);
    for (const [at, second] of later.entries()) {
      for (const third of later.slice(at + 1)) {
        const carries = (support[first] ?? 0) + (support[second] ?? 0) + (support[third] ?? 0) > 0;
        if (carries && near[second]?.includes(third)) triangles.push(first, second, third);
      }
    }
  }
  return Uint32Array.from(triangles);
}
