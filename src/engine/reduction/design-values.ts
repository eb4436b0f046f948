import { wholeNumber } from '../whole-number.ts';
import { countValues, valuesDownwards } from './value-counts.ts';

/** Shares of the hours of a year, %. */
export const DESIGN_PERCENTS = [0.4, 1, 2, 5, 10] as const;

export interface DesignRow {
  readonly percent: number;
  /** Value that is reached or passed in so many of the hours, °C. */
  readonly valueC: number;
  /** Mean of the other quantity over the hours within 0.5 K of the value, °C. */
  readonly coincidentC: number;
}

export interface DesignValues {
  /** Dry bulb with mean coincident wet bulb; wet bulb and dew point with mean coincident dry bulb. */
  readonly dryBulb: readonly DesignRow[];
  readonly wetBulb: readonly DesignRow[];
  readonly dewPoint: readonly DesignRow[];
}

const COINCIDENT_WITHIN_HUNDREDTHS = 50;
/** Stands for a value that is not known, and one for a value below any that matters. */
const UNKNOWN = -(2 ** 31);
const LOWEST_C = -330;
const LOW = 100 * LOWEST_C - 1;

/**
 * The value at place floor(percent x N / 100), counted from 0 downwards, of the N known values: at most so many percent of
 * the hours lie above it.
 * @param downwards known values, highest first; at least one
 * @throws RangeError without values
 */
export function valueAtPercent(downwards: ArrayLike<number>, percent: number): number {
  const value = downwards[placeAtPercent(percent, downwards.length)];
  if (value === undefined) throw new RangeError(`no value at ${percent} % of ${downwards.length} hours`);
  return value;
}

function placeAtPercent(percent: number, hours: number): number {
  // Tenths of a percent, since 0.4 x 8760 / 100 in floating point may fall short of a whole number.
  return Math.floor((Math.round(percent * 10) * hours) / 1000);
}

/**
 * Design values of a year; no rows for a quantity that is nowhere known.
 * @param columns in °C, slot order, NaN where missing
 * @param columns.dewPointC the dew points that can matter, as `highDewPoints` gives them, or all
 */
export function designValues(columns: {
  dryBulbC: Float64Array;
  wetBulbC: Float64Array;
  dewPointC: Float64Array;
}): DesignValues {
  const dryBulb = hundredthsColumn(columns.dryBulbC);
  const wetBulb = hundredthsColumn(columns.wetBulbC);
  return {
    dryBulb: designRows(dryBulb, wetBulb),
    wetBulb: designRows(wetBulb, dryBulb),
    dewPoint: designRows(hundredthsColumn(columns.dewPointC), dryBulb),
  };
}

function hundredthsColumn(column: Float64Array): Int32Array {
  const values = new Int32Array(column.length);
  for (let slot = 0; slot < values.length; slot++) {
    const value = column[slot] ?? Number.NaN;
    values[slot] = value >= LOWEST_C ? wholeNumber(100 * value) : Number.isNaN(value) ? UNKNOWN : LOW;
  }
  return values;
}

function designRows(quantity: Int32Array, coincident: Int32Array): readonly DesignRow[] {
  const counts = countValues(quantity, LOW, coincident);
  if (counts.known === 0) return [];
  const places = DESIGN_PERCENTS.map((percent) => placeAtPercent(percent, counts.known));
  const values = valuesDownwards(counts, places);
  const means = meansAround(values, quantity, coincident);
  return DESIGN_PERCENTS.map((percent, index) => ({
    percent,
    valueC: (values[index] ?? Number.NaN) / 100,
    coincidentC: Math.round(means[index] ?? Number.NaN) / 100,
  }));
}

/** Mean companion of the values within half a kelvin of each of some values, which are in descending order. */
function meansAround(around: readonly number[], values: Int32Array, companions: Int32Array): readonly number[] {
  const floor = (around.at(-1) ?? 0) - COINCIDENT_WITHIN_HUNDREDTHS;
  const counts = new Int32Array(around.length);
  const sums = new Int32Array(around.length);
  for (let slot = 0; slot < values.length; slot++) {
    const value = values[slot] ?? UNKNOWN;
    // Nearly nine of ten hours lie below all of them.
    if (value < floor) continue;
    const companion = companions[slot] ?? UNKNOWN;
    if (companion === UNKNOWN) continue;
    for (let index = 0; index < counts.length; index++) {
      if (Math.abs(value - (around[index] ?? 0)) > COINCIDENT_WITHIN_HUNDREDTHS) continue;
      counts[index] = (counts[index] ?? 0) + 1;
      sums[index] = (sums[index] ?? 0) + companion;
    }
  }
  return around.map((_middle, index) => (sums[index] ?? 0) / (counts[index] ?? 1));
}
