import type { LeaveOneOutError, SurfaceAnswer, SurfaceCells } from '#contract/surface.ts';
import type { ScoreAnchor } from '#engine/brief/brief.ts';
import { interpolateScores } from '#engine/interpolation/interpolate-score.ts';
import { choosePower, type LeaveOneOut } from '#engine/interpolation/leave-one-out.ts';
import { type StationFigures, stationFigures } from '#engine/interpolation/station-figures.ts';
import type { RawComponents } from '#engine/score/weighted-score.ts';
import type { SurfaceGrid, SurfaceStation } from '../../jobs/web-task.ts';
import { NEAREST_STATIONS } from './surface-grid.ts';
import type { SurfaceGround, SurfaceGrounds } from './surface-ground.ts';

/** A station with a score; others have nothing to interpolate. */
export interface ScoredStation extends SurfaceStation {
  readonly raw: RawComponents;
}

/** Of fewer stations a surface would show little but their distances. */
export const LEAST_STATIONS = 3;
const NO_SCORE = -32_768;

/** The surface between stations under one brief. @param asked.held key of the cells that the asker holds */
export async function surfaceOf(
  grounds: SurfaceGrounds,
  asked: {
    stations: readonly ScoredStation[];
    anchors: readonly ScoreAnchor[];
    held: string | undefined;
    signal: AbortSignal;
  },
): Promise<SurfaceAnswer> {
  const { stations, anchors, held, signal } = asked;
  if (stations.length < LEAST_STATIONS) return { off: offWords(stations.length), surface: null };
  const ground = await grounds.take(stations, signal);
  const figures = stationFigures(anchors, stations);
  const chosen = choosePower({ figures, others: ground.grid.others });
  return {
    off: null,
    surface: {
      cellsKey: ground.key,
      cells: held === ground.key ? null : presentCells(ground.grid),
      scores: base64(scoresOf({ figures, ground, power: chosen.power })),
      ...presentMethod(figures, chosen),
    },
  };
}

export function offWords(count: number): string {
  const found = count === 0 ? 'there is none' : count === 1 ? 'there is 1' : `there are ${count}`;
  return `A surface needs ${LEAST_STATIONS} stations with a score; ${found}.`;
}

/** Power, error and slopes, as they are told with a surface and with a single estimate. */
export function presentMethod(
  figures: StationFigures,
  { power, rootMeanSquare, meanAbsolute, bias }: LeaveOneOut & { readonly power: number },
): { power: number; neighbours: number; error: LeaveOneOutError | null; withHeight: string[] } {
  return {
    power,
    neighbours: Math.min(NEAREST_STATIONS, figures.stations),
    error: Number.isNaN(rootMeanSquare) ? null : { rootMeanSquare, meanAbsolute, bias, stations: figures.stations },
    withHeight: figures.columns.filter(({ slopePerM }) => slopePerM !== 0).map(({ anchor }) => anchor.component),
  };
}

function scoresOf(on: { figures: StationFigures; ground: SurfaceGround; power: number }): Int16Array {
  const { figures, ground, power } = on;
  const { support } = ground.grid;
  const exact = interpolateScores(figures, ground.pointsOf(power));
  const scores = new Int16Array(exact.length);
  for (let cell = 0; cell < scores.length; cell++) {
    const score = exact[cell] ?? Number.NaN;
    scores[cell] = support[cell] === 0 || Number.isNaN(score) ? NO_SCORE : Math.round(100 * score);
  }
  return scores;
}

function presentCells(grid: SurfaceGrid): SurfaceCells {
  const [west, east] = endsOf(grid.longitudes);
  const [south, north] = endsOf(grid.latitudes);
  return {
    cells: grid.support.length,
    spacingKm: grid.spacingKm,
    west,
    east,
    south,
    north,
    longitudes: base64(sharesOf(grid.longitudes, west, east)),
    latitudes: base64(sharesOf(grid.latitudes, south, north)),
    support: base64(grid.support),
    triangles: base64(grid.triangles),
  };
}

function endsOf(values: Float32Array): [least: number, greatest: number] {
  return [
    values.reduce((least, value) => Math.min(least, value), Number.POSITIVE_INFINITY),
    values.reduce((greatest, value) => Math.max(greatest, value), Number.NEGATIVE_INFINITY),
  ];
}

function sharesOf(values: Float32Array, least: number, greatest: number): Uint16Array {
  const steps = 65_535 / Math.max(greatest - least, Number.EPSILON);
  return Uint16Array.from(values, (value) => Math.round((value - least) * steps));
}

/** Typed arrays as they lie in memory: little-endian on every machine that Node runs on. */
function base64({ buffer, byteOffset, byteLength }: ArrayBufferView): string {
  return Buffer.from(buffer, byteOffset, byteLength).toString('base64');
}
