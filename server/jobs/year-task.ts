/** What the thread is asked that works on one weather year at a time, and what it answers. */
import type { Brief } from '#engine/brief/brief.ts';
import type { ClimateDifference } from '#engine/climate/climate-difference.ts';
import type { ImpossibleChange } from '#engine/climate/derive-year.ts';
import type { HumidityRule, MonthlyChange } from '#engine/climate/monthly-change.ts';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { BelowZeroPhase } from '#engine/psychrometrics/moist-air.ts';
import type { ReducedYear } from '#engine/reduction/reduce-year.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import type { HoursTableOrigin } from '#engine/run/hours-csv.ts';
import type { HourRow, HoursTable } from '#engine/run/hours-table.ts';
import type { ReadOptions } from '#engine/weather-files/read-options.ts';

/** A change of climate to be made of a weather year. */
export interface DeriveTask {
  readonly parent: WeatherYear;
  readonly belowZero: BelowZeroPhase;
  /** January first. */
  readonly monthly: readonly MonthlyChange[];
  readonly humidityRule: HumidityRule;
}

export type Derived =
  | {
      readonly ok: true;
      readonly reduced: ReducedYear;
      readonly cappedHours: number;
      readonly difference: ClimateDifference;
    }
  | { readonly ok: false; readonly faults: ImpossibleChange['faults'] };

/** The hours of a run to be written as a table. */
export interface HoursTask {
  readonly year: WeatherYear;
  readonly brief: Brief;
  readonly heightM: number;
  /** The run's own, and the zone that its civil times are told in. */
  readonly clock: ResolvedClock;
  readonly zone: string;
  readonly origin: HoursTableOrigin;
}

export interface WrittenHours {
  /** CSV in UTF-8. */
  readonly bytes: Uint8Array;
  /** As a run keeps them: the position of each slot's class in the list of classes. */
  readonly hourClassCodes: Uint8Array;
}

/** The hours of a run, those of some slots. */
export interface HourRowsTask {
  readonly year: WeatherYear;
  readonly brief: Brief;
  readonly heightM: number;
  readonly clock: ResolvedClock;
  readonly zone: string;
  /** In their order. */
  readonly slots: readonly number[];
}

export interface HourRows {
  readonly rows: readonly HourRow[];
  readonly limitUnit: HoursTable['limitUnit'];
  /** As a run keeps them, of every slot. */
  readonly hourClassCodes: Uint8Array;
}

/** An original with what it was read by, to be read again for the lines of its hours. */
export interface OriginalToRead {
  readonly content: Uint8Array;
  readonly name: string;
  readonly options: ReadOptions;
  /** Which of the years of one upload. */
  readonly part: string;
}

export interface LinesTask {
  readonly original: OriginalToRead;
  /** The year as it was stored: lines count only where they lead to it. */
  readonly year: WeatherYear;
  readonly zone: string;
}

export type YearTask =
  | { readonly kind: 'derive'; readonly task: DeriveTask }
  | { readonly kind: 'rows'; readonly task: HourRowsTask }
  | { readonly kind: 'lines'; readonly task: LinesTask }
  | { readonly kind: 'hours'; readonly task: HoursTask };
export type YearAnswer =
  | { readonly kind: 'derive'; readonly answer: Derived }
  | { readonly kind: 'rows'; readonly answer: HourRows }
  /** Line of each slot, 0 where none holds it; null where the original no longer leads to the year. */
  | { readonly kind: 'lines'; readonly answer: Uint32Array | null }
  | { readonly kind: 'hours'; readonly answer: WrittenHours };
