/**
 * Scores between stations (method 9): each raw component by inverse distance, with its slope over height, kept within the range
 * of its stations; the score is then formed from the components as that of a place is.
 */
import type { Neighbours } from './nearest-stations.ts';
import type { FigureColumn, StationFigures } from './station-figures.ts';

/** Where estimates are asked for, with the stations that each rests on. */
export interface SurfacePoints {
  readonly neighbours: Neighbours;
  /** As `distanceWeights` gives them. */
  readonly weights: Float32Array;
  readonly elevationsM: Float32Array;
  /** Station whose own figures stand at the point, or -1. */
  readonly held: Int32Array;
}

/** Exact scores, 0..100, by point; NaN where no component applies. */
export function interpolateScores(figures: StationFigures, points: SurfacePoints): Float32Array {
  const count = points.neighbours.points;
  const sums = new Float32Array(count);
  const isPatchy = figures.columns.some(({ everywhere }) => !everywhere);
  const fixedWeight = figures.columns.reduce(
    (sum, { everywhere, anchor }) => sum + (everywhere ? anchor.weight : 0),
    0,
  );
  const weights = isPatchy ? new Float32Array(count).fill(fixedWeight) : null;
  const ground = groundOf(figures, points);
  const raw = new Float64Array(weights === null ? 0 : count);
  for (const column of figures.columns) {
    if (weights === null || column.everywhere) addPointsEverywhere(sums, column, ground);
    else {
      fillColumn(raw, column, ground);
      addPoints(column, { raw, sums, weights });
    }
  }
  for (let point = 0; point < count; point++) {
    const total = weights === null ? fixedWeight : (weights[point] ?? 0);
    sums[point] = total > 0 ? (sums[point] ?? 0) / total : Number.NaN;
  }
  return sums;
}

/** One raw component by point; NaN where it applies at no neighbour. */
export function interpolateColumn(
  column: FigureColumn,
  on: { figures: StationFigures; points: SurfacePoints },
): Float64Array {
  const raw = new Float64Array(on.points.neighbours.points);
  fillColumn(raw, column, groundOf(on.figures, on.points));
  return raw;
}

interface Ground {
  readonly figures: StationFigures;
  readonly points: SurfacePoints;
  /** How much higher each point lies than its neighbours, weighted as their figures are, m; null without any slope. */
  readonly heightAboveM: Float32Array | null;
}

function groundOf(figures: StationFigures, points: SurfacePoints): Ground {
  if (figures.columns.every(({ slopePerM }) => slopePerM === 0)) return { figures, points, heightAboveM: null };
  const heights = new Float64Array(points.neighbours.points);
  fillMeans(heights, figures.elevationsM, points);
  const heightAboveM = points.elevationsM.map((heightM, point) => heightM - (heights[point] ?? 0));
  return { figures, points, heightAboveM };
}

function fillColumn(raw: Float64Array, column: FigureColumn, { figures, points, heightAboveM }: Ground): void {
  const { values, slopePerM } = column;
  if (column.everywhere) {
    fillMeans(raw, values, points);
    if (slopePerM !== 0 && heightAboveM !== null) {
      for (let point = 0; point < raw.length; point++) {
        raw[point] = (raw[point] ?? 0) + slopePerM * (heightAboveM[point] ?? 0);
      }
    }
  } else fillMeansOfPresent(raw, column, { figures, points });
  hold(raw, column, points.held);
}

/** Within the range of the stations; where a point holds a station, that one's own figure. */
function hold(raw: Float64Array, { values, extremes: { least, greatest } }: FigureColumn, held: Int32Array): void {
  for (let point = 0; point < raw.length; point++) {
    const station = held[point] ?? -1;
    raw[point] =
      station >= 0 ? (values[station] ?? Number.NaN) : Math.min(Math.max(raw[point] ?? Number.NaN, least), greatest);
  }
}

function fillMeans(means: Float64Array, values: Float64Array, { neighbours, weights }: SurfacePoints): void {
  const { points, each, stations } = neighbours;
  for (let point = 0, at = 0; point < points; point++) {
    let sum = 0;
    for (const end = at + each; at < end; at++) sum += (weights[at] ?? 0) * (values[stations[at] ?? 0] ?? 0);
    means[point] = sum;
  }
}

/** The weight of neighbours to which the component does not apply is shared over the others in proportion. */
function fillMeansOfPresent(
  means: Float64Array,
  { values, slopePerM }: FigureColumn,
  { figures, points: { neighbours, weights, elevationsM } }: Pick<Ground, 'figures' | 'points'>,
): void {
  const { points, each, stations } = neighbours;
  for (let point = 0, at = 0; point < points; point++) {
    let [sum, heights, total] = [0, 0, 0];
    for (const end = at + each; at < end; at++) {
      const station = stations[at] ?? 0;
      const value = values[station] ?? Number.NaN;
      if (Number.isNaN(value)) continue;
      const weight = weights[at] ?? 0;
      sum += weight * value;
      heights += weight * (figures.elevationsM[station] ?? 0);
      total += weight;
    }
    means[point] = total > 0 ? sum / total + slopePerM * ((elevationsM[point] ?? 0) - heights / total) : Number.NaN;
  }
}

/**
 * Adds the points of a component that applies at every station. One pass, which comes to the same as `fillColumn` and `addPoints`: a
 * slider waits for this over every cell and component.
 */
function addPointsEverywhere(sums: Float32Array, column: FigureColumn, { points, heightAboveM }: Ground): void {
  const { anchor, extremes, slopePerM, values } = column;
  const { held, neighbours, weights } = points;
  const { each, stations } = neighbours;
  const { least, greatest } = extremes;
  const { a0, weight } = anchor;
  const gain = 100 / (anchor.a100 - a0);
  const above = slopePerM === 0 ? null : heightAboveM;
  for (let point = 0, at = 0; point < sums.length; point++) {
    let raw = 0;
    for (const end = at + each; at < end; at++) raw += (weights[at] ?? 0) * (values[stations[at] ?? 0] ?? 0);
    if (above !== null) raw += slopePerM * (above[point] ?? 0);
    const station = held[point] ?? -1;
    raw = station >= 0 ? (values[station] ?? Number.NaN) : Math.min(Math.max(raw, least), greatest);
    sums[point] = (sums[point] ?? 0) + Math.min(Math.max((raw - a0) * gain, 0), 100) * weight;
  }
}

/** Adds the points of one component, s = clamp(100 (x - a0) / (a100 - a0)) x weight, and its weight where it applies. */
function addPoints(
  { anchor }: FigureColumn,
  to: { raw: Float64Array; sums: Float32Array; weights: Float32Array },
): void {
  const { raw, sums, weights } = to;
  const { a0, weight } = anchor;
  const gain = 100 / (anchor.a100 - a0);
  for (let point = 0; point < raw.length; point++) {
    const normalised = ((raw[point] ?? Number.NaN) - a0) * gain;
    if (Number.isNaN(normalised)) continue;
    sums[point] = (sums[point] ?? 0) + Math.min(Math.max(normalised, 0), 100) * weight;
    weights[point] = (weights[point] ?? 0) + weight;
  }
}
