/**
 * What a format's reader hands over: one entry per row of the file, in the order of the file, in SI, missing as NaN.
 * Whatever is peculiar to a format (missing codes, units, hour numbering) is already settled.
 */
export interface SourceRows {
  /** Line of the file, counted from 1. */
  readonly lines: number[];
  /** Calendar year, or 0 when the file does not say. */
  readonly years: number[];
  readonly months: number[];
  readonly days: number[];
  /** Hour that ends, 1 to 24; 0 is 24:00 of the day before. */
  readonly hours: number[];
  /** Minute as written; it only orders the rows of an hour. */
  readonly minutes: number[];
  readonly dryBulbC: number[];
  readonly dewPointC: number[];
  readonly relativeHumidityPct: number[];
  readonly pressurePa: number[];
  /** Which values the source itself calls interpolated or modelled: bits of `VALUE`. */
  readonly estimated: number[];
}

/** One bit for each value of a row. */
export const VALUE = { dryBulb: 1, dewPoint: 2, relativeHumidity: 4, pressure: 8 } as const;

export function emptyRows(): SourceRows {
  return {
    lines: [],
    years: [],
    months: [],
    days: [],
    hours: [],
    minutes: [],
    dryBulbC: [],
    dewPointC: [],
    relativeHumidityPct: [],
    pressurePa: [],
    estimated: [],
  };
}
