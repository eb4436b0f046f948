/** The hours of a file as the tests see them: whole hundredths in small integers, so that a test is a cheap pass. */
import { HOURS_PER_DAY, MISSING_INT16 } from '../../conventions.ts';
import { monthStartSlots } from '../../reduction/calendar.ts';
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
    dryBulb: testedColumn('dry bulb', VALUE.dryBulb, steps.dryBulbC),
    dewPoint: testedColumn('dew point', VALUE.dewPoint, steps.dewPointC),
    pressureGiven: steps.pressurePa.some((pressurePa) => pressurePa > 0),
    failed: new Uint8Array(steps.lines.length),
    failedAlone: [],
    jumps: [],
    months,
    unbroken: typical ? months : [{ start: 0, end: steps.lines.length }],
  };
}

// One pass for both, since every file goes through it.
function testedColumn(variable: TestedColumn['variable'], bit: number, column: Float64Array): TestedColumn {
  const asRead = new Int16Array(column.length);
  const grains = { present: 0, half: 0, whole: 0 };
  for (let step = 0; step < column.length; step++) {
    const exact = (column[step] ?? Number.NaN) * 100;
    // A value beyond the integers of the column is beyond every limit as well; NaN is neither above nor below.
    const value =
      exact > FARTHEST ? FARTHEST : exact >= -FARTHEST ? Math.round(exact) : exact < 0 ? -FARTHEST : MISSING_INT16;
    asRead[step] = value;
    if (value === MISSING_INT16) continue;
    grains.present++;
    const halves = (value / 50) | 0;
    if (halves * 50 !== value) continue;
    grains.half++;
    if ((halves & 1) === 0) grains.whole++;
  }
  return { variable, bit, asRead, values: asRead.slice(), resolution: resolutionOf(grains) };
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
