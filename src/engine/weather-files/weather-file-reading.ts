import type { BelowZeroPhase } from '../psychrometrics/moist-air.ts';
import type { GapCalendar } from '../reduction/gap-calendar.ts';
import type { YearKind } from '../reduction/weather-year.ts';
import type { Ask, Finding } from './finding.ts';
import type { TableGuess } from './table/table-guess.ts';

/** The formats that are recognised by their content; a delimited table is what is left. */
export type WeatherFormat = 'EPW' | 'TMY3' | 'TMY2' | 'ISD-Lite' | 'ISD' | 'Global Hourly' | 'table';

/** The place that a file declares for itself. */
export interface DeclaredStation {
  readonly name: string;
  /** Degrees, north and east positive; null when the file does not say, which it is then asked about. */
  readonly latitude: number | null;
  readonly longitude: number | null;
  /** null when the file does not say. */
  readonly elevationM: number | null;
  /** Hours ahead of UTC; null when the file does not say, which it is then asked about. */
  readonly utcOffsetH: number | null;
  readonly wmoNumber: string | null;
}

/**
 * The hours of one year in slot order, after repairs and gap rule 1: every column has 8760 or 8784 values, NaN where the
 * value is missing. `lines` is the line of the file that each slot came from, 0 where no row did.
 */
export interface HourColumns {
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
  readonly pressurePa: Float64Array;
  /** Provenance of each value, see `hour-flags.ts`. */
  readonly flags: Uint8Array;
  readonly lines: Uint32Array;
}

export interface RefusedReading {
  readonly status: 'refused';
  /** Which station-year of the file: empty when it holds one, else its station, its year or both. */
  readonly part: string;
  readonly format: WeatherFormat | null;
  readonly station: DeclaredStation | null;
  readonly findings: readonly Finding[];
}

export interface UsableReading {
  /** `asks` until a person has answered; the hours are read as they stand. */
  readonly status: 'asks' | 'review';
  /** Which station-year of the file: empty when it holds one, else its station, its year or both. */
  readonly part: string;
  readonly format: WeatherFormat;
  readonly station: DeclaredStation;
  readonly kind: YearKind;
  /** The calendar year of an `actual` year, else null. */
  readonly year: number | null;
  readonly hours: HourColumns;
  /** Which column the humidity came from. */
  readonly humidityFrom: 'dew point' | 'relative humidity' | 'wet bulb';
  readonly belowZero: BelowZeroPhase;
  readonly gaps: GapCalendar;
  readonly findings: readonly Finding[];
  readonly asks: readonly Ask[];
  /** Licence or attribution text that stands in the file, as it stands; null without any. */
  readonly comments: string | null;
}

/** A table whose columns nobody has confirmed yet: it has no hours, only a guess and questions. */
export interface UnmappedReading {
  readonly status: 'asks';
  readonly part: '';
  readonly format: 'table';
  /** What the lines above the table say of the place. */
  readonly station: DeclaredStation;
  readonly hours: null;
  readonly table: TableGuess;
  readonly findings: readonly Finding[];
  readonly asks: readonly Ask[];
  readonly comments: string | null;
}

export type WeatherFileReading = RefusedReading | UnmappedReading | UsableReading;
