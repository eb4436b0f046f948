/**
 * How a table is read: which column holds what, in which unit, and what its times mean. Guessed, confirmed by a person, and
 * remembered for tables of the same shape. Plain JSON; columns are named as `TableLayout.names` has them.
 */

export const temperatureUnits = ['C', 'K', 'F'] as const;
export type TemperatureUnit = (typeof temperatureUnits)[number];
export const humidityUnits = ['%', 'fraction'] as const;
export type HumidityUnit = (typeof humidityUnits)[number];
export const pressureUnits = ['Pa', 'hPa', 'kPa', 'inHg', 'mmHg'] as const;
export type PressureUnit = (typeof pressureUnits)[number];
/** At the station; at sea level; or the setting of an altimeter, which the standard atmosphere leads back to the station. */
export const pressureLevels = ['station', 'sea level', 'altimeter'] as const;
export type PressureLevel = (typeof pressureLevels)[number];

export const dateOrders = ['year first', 'day first', 'month first'] as const;
export type DateOrder = (typeof dateOrders)[number];
/** UTC; local standard time, a fixed offset; local clock time with daylight saving; or the offset that each stamp carries. */
export const timeScales = ['UTC', 'standard', 'clock', 'in stamps'] as const;
export type TimeScale = (typeof timeScales)[number];
/** What 14:00 means: the reading at 14:00, or the hour that ends or begins then. */
export const timeMarks = ['reading', 'ending', 'beginning'] as const;
export type TimeMark = (typeof timeMarks)[number];

/** Where the time of a row stands. */
export type TimeColumns =
  | { readonly form: 'stamp'; readonly column: string; readonly order: DateOrder }
  | { readonly form: 'date and time'; readonly date: string; readonly time: string; readonly order: DateOrder }
  | {
      readonly form: 'parts';
      readonly year: string | null;
      readonly month: string;
      readonly day: string;
      readonly hour: string;
      readonly minute: string | null;
      /** 14, or 1400. */
      readonly hours: 'hours' | 'hours and minutes';
    }
  /** Days of a spreadsheet, counted from 1900 or from 1904. */
  | { readonly form: 'serial days'; readonly column: string; readonly system: 1900 | 1904 }
  /** Seconds or milliseconds since 1970, UTC. */
  | { readonly form: 'epoch'; readonly column: string; readonly unit: 's' | 'ms' };

export interface TimeMapping {
  readonly columns: TimeColumns;
  readonly scale: TimeScale;
  /** IANA zone of clock time; null for every other scale. */
  readonly zone: string | null;
  readonly mark: TimeMark;
}

export interface TemperatureColumn {
  readonly column: string;
  readonly unit: TemperatureUnit;
}

export interface TableMapping {
  readonly time: TimeMapping;
  /** Whether the dates are real, so that each year is an actual one, or those of a typical year made of months. */
  readonly years: 'actual' | 'typical';
  readonly dryBulb: TemperatureColumn;
  readonly dewPoint: TemperatureColumn | null;
  readonly relativeHumidity: { readonly column: string; readonly unit: HumidityUnit } | null;
  readonly wetBulb: TemperatureColumn | null;
  readonly pressure: { readonly column: string; readonly unit: PressureUnit; readonly level: PressureLevel } | null;
  /** Column that tells several stations apart; null when the table holds one. */
  readonly station: string | null;
}
