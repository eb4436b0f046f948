/** The hours of a file as the tests see them: whole hundredths in small integers, so that a test is a cheap pass. */
import { HOURS_PER_DAY, MISSING_INT16 } from '../../conventions.ts';
import { monthStartSlots } from '../../reduction/calendar.ts';
import { wholeNumber } from '../../whole-number.ts';
import { VALUE } from '../assembly/source-rows.ts';
import type { StepColumns } from '../assembly/step-columns.ts';
import { type Resolution, resolutionOf } from './resolution.ts';

/** A column of temperatures, 0.01 °C. */
export interface TestedColumn {
  readonly variable: 'dry bulb' | 'dew point';
  readonly bit: number;
  /** `MISSING_INT16` where the value is missing or has failed. */
  readonly values: Int16Array;
  /** As the file gives it, before any test. */
  readonly asRead: Int16Array;
  readonly resolution: Resolution;
  /** What the values keep within as read, so that a test can tell at once that it would find nothing. */
  readonly bounds: ColumnBounds;
}

/** Hundredths of a degree; without any value `least` is above `most`. */
export interface ColumnBounds {
  readonly least: number;
  readonly most: number;
  /** The largest change from one value to the next, up or down. */
  readonly change: number;
  /** Difference of the greatest and the least value of each month. */
  readonly monthRanges: readonly number[];
}

/** Steps from `start` to the one before `end`. */
export interface StepSpan {
  readonly start: number;
  readonly end: number;
}

/** A change of the dry bulb between a step and the one before it that is told, whatever becomes of it. */
export interface Jump {
  readonly step: number;
  /** Hundredths of a kelvin, negative for a fall. */
  readonly change: number;
  /** Why it is weather; null when nothing says so. */
  readonly weather: 'outflow' | 'foehn' | null;
}

export interface TestedHours {
  /** Where what fails becomes NaN. */
  readonly steps: StepColumns;
  readonly stepsPerDay: number;
  readonly dryBulb: TestedColumn;
  readonly dewPoint: TestedColumn;
  /** Whether the file gives a pressure anywhere. */
  readonly pressureGiven: boolean;
  /** Bits of `VALUE` that a test has failed. */
  readonly failed: Uint8Array;
  /** Steps of which a temperature failed range or step, in the order in which it was found. */
  readonly failedAlone: number[];
  readonly jumps: Jump[];
  readonly months: readonly StepSpan[];
  /** Stretches within which one hour follows on the other: the months of a typical year, the whole of an actual one. */
  readonly unbroken: readonly StepSpan[];
}

/** Hundredths of a degree that an integer of the column can hold. */
const FARTHEST = 32_767;

export function testedHours(steps: StepColumns, typical: boolean): TestedHours {
  const { slotCount, stepsPerHour } = steps;
  const starts = monthStartSlots(slotCount);
  const months = starts.slice(1).map((end, month) => ({
    start: (starts[month] ?? 0) * stepsPerHour,
    end: end * stepsPerHour,
  }));
  return {
    steps,
    stepsPerDay: HOURS_PER_DAY * stepsPerHour,
    dryBulb: testedColumn('dry bulb', VALUE.dryBulb, { column: steps.dryBulbC, months }),
    dewPoint: testedColumn('dew point', VALUE.dewPoint, { column: steps.dewPointC, months }),
    pressureGiven: steps.pressurePa.some((pressurePa) => pressurePa > 0),
    failed: new Uint8Array(steps.lines.length),
    failedAlone: [],
    jumps: [],
    months,
    unbroken: typical ? months : [{ start: 0, end: steps.lines.length }],
  };
}

// One pass for everything that is to be known of a column, since every file goes through it.
function testedColumn(
  variable: TestedColumn['variable'],
  bit: number,
  { column, months }: { column: Float64Array; months: readonly StepSpan[] },
): TestedColumn {
  const asRead = new Int16Array(column.length);
  const grains = { present: 0, half: 0, whole: 0 };
  const monthRanges: number[] = [];
  let least = FARTHEST;
  let most = -FARTHEST;
  let change = 0;
  let before = MISSING_INT16;
  for (const { start, end } of months) {
    let low = FARTHEST;
    let high = -FARTHEST;
    let half = 0;
    let whole = 0;
    let present = 0;
    for (let step = start; step < end; step++) {
      const exact = (column[step] ?? Number.NaN) * 100;
      const value = exact >= -FARTHEST && exact <= FARTHEST ? wholeNumber(exact) : beyond(exact);
      asRead[step] = value;
      if (value === MISSING_INT16) {
        before = value;
        continue;
      }
      present++;
      if (value < low) low = value;
      if (value > high) high = value;
      const moved = value > before ? value - before : before - value;
      if (moved > change && before !== MISSING_INT16) change = moved;
      before = value;
      const halves = (value / 50) | 0;
      if (halves * 50 !== value) continue;
      half++;
      if ((halves & 1) === 0) whole++;
    }
    grains.present += present;
    grains.half += half;
    grains.whole += whole;
    monthRanges.push(high - low);
    least = Math.min(least, low);
    most = Math.max(most, high);
  }
  const bounds = { least, most, change, monthRanges };
  return { variable, bit, asRead, values: asRead.slice(), resolution: resolutionOf(grains), bounds };
}

/** A value beyond the integers of the column is beyond every limit as well. */
function beyond(exact: number): number {
  return Number.isNaN(exact) ? MISSING_INT16 : exact > 0 ? FARTHEST : -FARTHEST;
}

/** Leaves out temperatures of one step: bits of `VALUE`, dry bulb and dew point. */
export function leaveOut(hours: TestedHours, step: number, bits: number): void {
  const { dewPoint, dryBulb, failed, steps } = hours;
  if ((bits & VALUE.dryBulb) !== 0 && dryBulb.values[step] !== MISSING_INT16) {
    dryBulb.values[step] = MISSING_INT16;
    steps.dryBulbC[step] = Number.NaN;
    failed[step] = (failed[step] ?? 0) | VALUE.dryBulb;
  }
  if ((bits & VALUE.dewPoint) !== 0 && dewPoint.values[step] !== MISSING_INT16) {
    dewPoint.values[step] = MISSING_INT16;
    steps.dewPointC[step] = Number.NaN;
    failed[step] = (failed[step] ?? 0) | VALUE.dewPoint;
  }
}

/** Leaves out every temperature and humidity of one step. */
export function leaveOutHour(hours: TestedHours, step: number): void {
  leaveOut(hours, step, VALUE.dryBulb | VALUE.dewPoint);
  if (Number.isNaN(hours.steps.relativeHumidityPct[step])) return;
  hours.steps.relativeHumidityPct[step] = Number.NaN;
  hours.failed[step] = (hours.failed[step] ?? 0) | VALUE.relativeHumidity;
}

/** Hundredths as a temperature is written: 16.1. */
export function degrees(value: number): string {
  return (value / 100).toFixed(1);
}
