import { hundredths } from '../conventions.ts';

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

/**
 * The value at place floor(percent x N / 100), counted from 0 downwards, of the N known values: at most so many percent of
 * the hours lie above it.
 * @param downwards known values, highest first; at least one
 * @throws RangeError without values
 */
export function valueAtPercent(downwards: ArrayLike<number>, percent: number): number {
  // Tenths of a percent, since 0.4 x 8760 / 100 in floating point may fall short of a whole number.
  const place = Math.floor((Math.round(percent * 10) * downwards.length) / 1000);
  const value = downwards[place];
  if (value === undefined) throw new RangeError(`no value at ${percent} % of ${downwards.length} hours`);
  return value;
}

/** Design values of a year; no rows for a quantity that is nowhere known. Columns are in °C, slot order, NaN where missing. */
export function designValues(columns: {
  dryBulbC: Float64Array;
  wetBulbC: Float64Array;
  dewPointC: Float64Array;
}): DesignValues {
  const { dewPointC, dryBulbC, wetBulbC } = columns;
  return {
    dryBulb: designRows(dryBulbC, wetBulbC),
    wetBulb: designRows(wetBulbC, dryBulbC),
    dewPoint: designRows(dewPointC, dryBulbC),
  };
}

function designRows(quantity: Float64Array, coincident: Float64Array): readonly DesignRow[] {
  const known: { value: number; other: number }[] = [];
  for (let slot = 0; slot < quantity.length; slot++) {
    const value = quantity[slot] ?? Number.NaN;
    const other = coincident[slot] ?? Number.NaN;
    if (!Number.isNaN(value + other)) known.push({ value: hundredths(value), other: hundredths(other) });
  }
  if (known.length === 0) return [];
  const downwards = Int32Array.from(known, ({ value }) => value)
    .sort()
    .reverse();
  return DESIGN_PERCENTS.map((percent) => {
    const value = valueAtPercent(downwards, percent);
    let hours = 0;
    let sum = 0;
    for (const hour of known) {
      if (Math.abs(hour.value - value) > COINCIDENT_WITHIN_HUNDREDTHS) continue;
      hours++;
      sum += hour.other;
    }
    return { percent, valueC: value / 100, coincidentC: Math.round(sum / hours) / 100 };
  });
}
