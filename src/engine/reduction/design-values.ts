import { hundredths } from '../conventions.ts';
import { countValues, meanCompanion, valuesDownwards } from './value-counts.ts';

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
/** Stands for a value that is not known. */
const UNKNOWN = -(2 ** 31);

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

/** Design values of a year; no rows for a quantity that is nowhere known. Columns are in °C, slot order, NaN where missing. */
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
  const values = new Int32Array(column.length).fill(UNKNOWN);
  for (let slot = 0; slot < values.length; slot++) {
    const value = column[slot] ?? Number.NaN;
    if (!Number.isNaN(value)) values[slot] = hundredths(value);
  }
  return values;
}

function designRows(quantity: Int32Array, coincident: Int32Array): readonly DesignRow[] {
  const counts = countValues(quantity, UNKNOWN + 1, coincident);
  if (counts.known === 0) return [];
  const places = DESIGN_PERCENTS.map((percent) => placeAtPercent(percent, counts.known));
  const values = valuesDownwards(counts, places);
  return DESIGN_PERCENTS.map((percent, index) => {
    const value = values[index] ?? Number.NaN;
    const coincidentMean = meanCompanion(counts, value, COINCIDENT_WITHIN_HUNDREDTHS);
    return { percent, valueC: value / 100, coincidentC: Math.round(coincidentMean) / 100 };
  });
}
