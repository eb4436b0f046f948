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
  const fixedWeight = figures.columns.reduce(
    (sum, { everywhere, anchor }) => sum + (everywhere ? anchor.weight : 0),
    0,
  );
  const weights = figures.columns.every(({ everywhere }) => everywhere)
    ? null
    : new Float32Array(count).fill(fixedWeight);
  for (const column of figures.columns) {
    const raw = interpolateColumn(column, { figures, points });
    addPoints(column, { raw, sums, weights: column.everywhere ? null : weights });
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
  const raw = column.everywhere ? weightedMeans(column.values, on.points) : meansOfPresent(column.values, on.points);
  if (column.slopePerM !== 0) addSlope(raw, { column, ...on });
  const { least, greatest } = column.extremes;
  for (let point = 0; point < raw.length; point++) {
    const held = on.points.held[point] ?? -1;
    raw[point] =
      held >= 0 ? (column.values[held] ?? Number.NaN) : Math.min(Math.max(raw[point] ?? Number.NaN, least), greatest);
  }
  return raw;
}

function weightedMeans(values: Float64Array, { neighbours, weights }: SurfacePoints): Float64Array {
  const { points, each, stations } = neighbours;
  const means = new Float64Array(points);
  for (let point = 0, at = 0; point < points; point++) {
    let sum = 0;
    for (let place = 0; place < each; place++, at++) sum += (weights[at] ?? 0) * (values[stations[at] ?? 0] ?? 0);
    means[point] = sum;
  }
  return means;
}

/** The weight of neighbours to which the component does not apply is shared over the others in proportion. */
function meansOfPresent(values: Float64Array, { neighbours, weights }: SurfacePoints): Float64Array {
  const { points, each, stations } = neighbours;
  const means = new Float64Array(points);
  for (let point = 0, at = 0; point < points; point++) {
    let [sum, total] = [0, 0];
    for (let place = 0; place < each; place++, at++) {
      const value = values[stations[at] ?? 0] ?? Number.NaN;
      if (Number.isNaN(value)) continue;
      sum += (weights[at] ?? 0) * value;
      total += weights[at] ?? 0;
    }
    means[point] = total > 0 ? sum / total : Number.NaN;
  }
  return means;
}

/** From the height that the neighbours stand for, weighted as their figures are, to that of the point. */
function addSlope(
  raw: Float64Array,
  { column, figures, points }: { column: FigureColumn; figures: StationFigures; points: SurfacePoints },
): void {
  const present = column.everywhere
    ? figures.elevationsM
    : figures.elevationsM.map((heightM, station) => (Number.isNaN(column.values[station]) ? Number.NaN : heightM));
  const heights = column.everywhere ? weightedMeans(present, points) : meansOfPresent(present, points);
  for (let point = 0; point < raw.length; point++) {
    const difference = (points.elevationsM[point] ?? 0) - (heights[point] ?? 0);
    raw[point] = (raw[point] ?? Number.NaN) + column.slopePerM * difference;
  }
}

/** Adds the points of one component, s = clamp(100 (x - a0) / (a100 - a0)) x weight, and its weight where it applies. */
function addPoints(
  { anchor }: FigureColumn,
  to: { raw: Float64Array; sums: Float32Array; weights: Float32Array | null },
): void {
  const { raw, sums, weights } = to;
  const { a0, weight } = anchor;
  const gain = 100 / (anchor.a100 - a0);
  for (let point = 0; point < raw.length; point++) {
    const normalised = ((raw[point] ?? Number.NaN) - a0) * gain;
    if (Number.isNaN(normalised)) continue;
    sums[point] = (sums[point] ?? 0) + Math.min(Math.max(normalised, 0), 100) * weight;
    if (weights !== null) weights[point] = (weights[point] ?? 0) + weight;
  }
}
