/**
 * What a format's reader hands over: one entry per row of the file, in the order of the file, in SI, missing as NaN.
 * Whatever is peculiar to a format (missing codes, units, hour numbering) is already settled.
 */
export interface SourceRows {
  /** Line of the file, counted from 1. */
  readonly lines: Uint32Array;
  /** Calendar year, or 0 when the file does not say. */
  readonly years: Int32Array;
  readonly months: Uint8Array;
  readonly days: Uint8Array;
  /** Hour that ends, 1 to 24; 0 is 24:00 of the day before. */
  readonly hours: Uint8Array;
  /** Minute as written; it only orders the rows of an hour. */
  readonly minutes: Uint8Array;
  readonly dryBulbC: Float64Array;
  readonly dewPointC: Float64Array;
  readonly relativeHumidityPct: Float64Array;
  readonly pressurePa: Float64Array;
  /** Which values the source itself calls interpolated or modelled: bits of `VALUE`. */
  readonly estimated: Uint8Array;
}

/** One row, as `RowCollector` takes it: whole numbers for the time, all fields as in `SourceRows`. */
export interface SourceRow {
  line: number;
  year: number;
  month: number;
  day: number;
  hour: number;
  minute: number;
  dryBulbC: number;
  dewPointC: number;
  relativeHumidityPct: number;
  pressurePa: number;
  estimated: number;
}

/** A row that says nothing, to be filled. */
export function emptyRow(): SourceRow {
  return {
    line: 0,
    year: 0,
    month: 0,
    day: 0,
    hour: 0,
    minute: 0,
    dryBulbC: Number.NaN,
    dewPointC: Number.NaN,
    relativeHumidityPct: Number.NaN,
    pressurePa: Number.NaN,
    estimated: 0,
  };
}

/** One bit for each value of a row. */
export const VALUE = { dryBulb: 1, dewPoint: 2, relativeHumidity: 4, pressure: 8 } as const;
