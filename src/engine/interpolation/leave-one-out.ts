/** How far a surface is out where the truth is known: each station estimated from the others alone (leave-one-out). */
import { distanceWeights } from './distance-weights.ts';
import { extremesWithout, heightSlope, withoutStation } from './height-slope.ts';
import type { Neighbours } from './nearest-stations.ts';
import type { FigureColumn, StationFigures } from './station-figures.ts';

export interface LeaveOneOut {
  /** Estimate less the station's own, by station; NaN where the others tell nothing. */
  readonly errors: Float64Array;
  readonly bias: number;
  readonly meanAbsolute: number;
  readonly rootMeanSquare: number;
}

/** Powers of the distance that are tried. */
export const POWERS = [1, 1.5, 2, 2.5, 3, 4] as const;

/** Error of one raw component at every station, in its unit. @param others as `nearestOthers` gives them */
export function leaveOneOutOfColumn(
  column: FigureColumn,
  on: { figures: StationFigures; others: Neighbours; power: number },
): LeaveOneOut {
  const estimates = estimatesWithout(column, { ...on, weights: distanceWeights(on.others, on.power) });
  return summaryOf(estimates.map((estimate, station) => estimate - (column.values[station] ?? Number.NaN)));
}

/** Error of the score at every station, points: components are estimated, the score is formed from them. */
export function leaveOneOutOfScore(on: { figures: StationFigures; others: Neighbours; power: number }): LeaveOneOut {
  const { figures, others, power } = on;
  const weights = distanceWeights(others, power);
  const estimated = new Float64Array(figures.stations);
  const own = new Float64Array(figures.stations);
  const [estimatedWeight, ownWeight] = [new Float64Array(figures.stations), new Float64Array(figures.stations)];
  for (const column of figures.columns) {
    addScore(column, estimatesWithout(column, { figures, others, weights }), estimated, estimatedWeight);
    addScore(column, column.values, own, ownWeight);
  }
  return summaryOf(
    estimated.map(
      (sum, station) => sum / (estimatedWeight[station] ?? 0) - (own[station] ?? 0) / (ownWeight[station] ?? 0),
    ),
  );
}

/** The power with the least root mean square error of the score; of equals, the lesser. */
export function choosePower(on: {
  figures: StationFigures;
  others: Neighbours;
}): LeaveOneOut & { readonly power: number } {
  const tried = POWERS.map((power) => ({ power, ...leaveOneOutOfScore({ ...on, power }) }));
  const [first, ...rest] = tried;
  if (first === undefined) throw new RangeError('no power to try');
  return rest.reduce((best, each) => (each.rootMeanSquare < best.rootMeanSquare ? each : best), first);
}

/** What the others say of each station; slope and range are theirs alone, too. */
function estimatesWithout(
  column: FigureColumn,
  on: { figures: StationFigures; others: Neighbours; weights: Float32Array },
): Float64Array {
  const { others, weights } = on;
  const { elevationsM } = on.figures;
  return column.values.map((own, station) => {
    if (Number.isNaN(own)) return Number.NaN;
    const heightM = elevationsM[station] ?? 0;
    let [sum, heights, total] = [0, 0, 0];
    for (let at = station * others.each; at < (station + 1) * others.each; at++) {
      const other = others.stations[at] ?? 0;
      const value = column.values[other] ?? Number.NaN;
      if (Number.isNaN(value)) continue;
      const weight = weights[at] ?? 0;
      sum += weight * value;
      heights += weight * (elevationsM[other] ?? 0);
      total += weight;
    }
    const span = extremesWithout(column.heights, heightM);
    const slope = heightSlope(withoutStation(column.sums, heightM, own), span.greatest - span.least);
    const estimate = sum / total + slope * (heightM - heights / total);
    const { least, greatest } = extremesWithout(column.extremes, own);
    return Math.min(Math.max(estimate, least), greatest);
  });
}

function addScore({ anchor }: FigureColumn, raw: Float64Array, sums: Float64Array, weights: Float64Array): void {
  const { a0, a100, weight } = anchor;
  for (let station = 0; station < raw.length; station++) {
    const normalised = (100 * ((raw[station] ?? Number.NaN) - a0)) / (a100 - a0);
    if (Number.isNaN(normalised)) continue;
    sums[station] = (sums[station] ?? 0) + weight * Math.min(Math.max(normalised, 0), 100);
    weights[station] = (weights[station] ?? 0) + weight;
  }
}

function summaryOf(errors: Float64Array): LeaveOneOut {
  let [count, sum, absolute, squares] = [0, 0, 0, 0];
  for (const error of errors) {
    if (Number.isNaN(error)) continue;
    count++;
    sum += error;
    absolute += Math.abs(error);
    squares += error * error;
  }
  return { errors, bias: sum / count, meanAbsolute: absolute / count, rootMeanSquare: Math.sqrt(squares / count) };
}
