import { hundredths } from '../conventions.ts';
import type { BelowZeroPhase } from '../psychrometrics/moist-air.ts';
import { wetBulbColumn } from '../psychrometrics/wet-bulb.ts';
import type { UsableReading } from '../weather-files/weather-file-reading.ts';
import { depressionHistogram, depressionHoursByMonth, type HoursAtLeast, hoursAtLeast } from './depression-hours.ts';
import { type DepressionSpell, longestLowDepression } from './depression-spell.ts';
import { depressionColumn, reachedHundredths } from './derived-columns.ts';
import { type DesignValues, designValues } from './design-values.ts';
import { highDewPoints } from './high-dew-points.ts';
import { packYear, unpackYear } from './packed-columns.ts';
import type { WeatherYear } from './weather-year.ts';
import { yearMeans } from './year-means.ts';
import { countHours, depressionCurve, type HourCounts, highestOf, monthCompleteness } from './year-summary.ts';

/** The figures of a weather year; every one is computed from its packed columns. */
export interface YearFacts extends HourCounts {
  readonly belowZero: BelowZeroPhase;
  readonly meanDryBulbC: number;
  /** null while neither pressure nor elevation is known, so that no hour has a wet bulb; so is `maxDepressionK`. */
  readonly meanWetBulbC: number | null;
  readonly maxDepressionK: number | null;
  /** Hours with a depression of at least K kelvin, K = 1..25, as read and scaled by month x hour of day. */
  readonly depressionHours: readonly HoursAtLeast[];
  /** Mean depression, K, by month (12) and hour of day (24); null where no hour is known. */
  readonly meanDepressionK: readonly (readonly (number | null)[])[];
  /** Share of hours present, %, by month. */
  readonly monthCompletePct: readonly number[];
  /** Means by month, January first; null where no hour is known. */
  readonly monthlyDryBulbC: readonly (number | null)[];
  readonly monthlyWetBulbC: readonly (number | null)[];
  readonly monthlyDepressionK: readonly (number | null)[];
  /** Depression, K, reached or passed in 0, 1, .. 100 % of the known hours; empty when none is known. */
  readonly depressionCurveK: readonly number[];
  /** Longest run of hours with a depression under 5 K; null without such an hour. */
  readonly lowDepressionSpell: DepressionSpell | null;
  readonly design: DesignValues;
}

export interface ReducedYear {
  readonly year: WeatherYear;
  /** Hours by month x hour of day x 1 K bin; the layout is stated at `depressionHistogram`. */
  readonly histogram: Uint16Array;
  /** Hours by month x 1 K bin; the layout is stated at `depressionHoursByMonth`. */
  readonly depressionHours: Uint16Array;
  readonly design: DesignValues;
  readonly facts: YearFacts;
}

/** Zone of a file that does not say, while it asks: the nearest whole hour of its longitude. */
const DEGREES_PER_HOUR = 15;

/**
 * Reduces the hours of a reading to a weather year: packed columns, depression hours, design values and facts.
 * Pure and deterministic: the same reading gives the same bytes.
 */
export function reduceYear(reading: UsableReading): ReducedYear {
  const { station, kind, year, belowZero } = reading;
  const offsetH = station.utcOffsetH ?? Math.round((station.longitude ?? 0) / DEGREES_PER_HOUR);
  const packed = packYear(reading.hours);
  return reducePackedYear({ kind, year, utcOffsetMin: Math.round(60 * offsetH), packed }, belowZero);
}

/** The same from columns that are packed already. */
export function reducePackedYear(year: WeatherYear, belowZero: BelowZeroPhase): ReducedYear {
  const { packed } = year;
  const columns = unpackYear(packed);
  const { dryBulbC } = columns;
  const wetBulbC = wetBulbColumn(dryBulbC, columns.humidityRatio, columns.pressurePa);
  const depressionK = depressionColumn(dryBulbC, wetBulbC);
  const depression = reachedHundredths(depressionK);
  const depressionHours = depressionHoursByMonth(depression);
  const design = designValues({ dryBulbC, wetBulbC, dewPointC: highDewPoints(columns) });
  const means = yearMeans({ dryBulbC, wetBulbC, depressionK });
  const highestK = highestOf(depressionK);
  return {
    year,
    histogram: depressionHistogram(depression),
    depressionHours,
    design,
    facts: {
      ...countHours(packed),
      belowZero,
      meanDryBulbC: means.dryBulbC ?? 0,
      meanWetBulbC: means.wetBulbC,
      maxDepressionK: highestK === null ? null : hundredths(highestK) / 100,
      depressionHours: hoursAtLeast(depression, depressionHours),
      meanDepressionK: means.depressionByHourK,
      monthCompletePct: monthCompleteness(packed),
      monthlyDryBulbC: means.monthlyDryBulbC,
      monthlyWetBulbC: means.monthlyWetBulbC,
      monthlyDepressionK: means.monthlyDepressionK,
      depressionCurveK: depressionCurve(depression),
      lowDepressionSpell: longestLowDepression(depression, year.kind),
      design,
    },
  };
}
