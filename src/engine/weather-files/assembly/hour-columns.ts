import { type BelowZeroPhase, saturationHumidityRatio } from '../../psychrometrics/moist-air.ts';
import { hourFlags, type Provenance } from '../../reduction/hour-flags.ts';
import type { HourColumns } from '../weather-file-reading.ts';
import { fillShortGaps } from './fill-gaps.ts';
import { fillLongGaps } from './fill-long-gaps.ts';
import { type HourValues, hoursFromSteps } from './hours-from-steps.ts';
import { type HumiditySource, humidityRatios } from './humidity-choice.ts';
import { VALUE } from './source-rows.ts';
import type { StepColumns } from './step-columns.ts';

/** Ours: a shift cannot make air drier than this, kg/kg, a dew point near -60 °C. */
const LEAST_RATIO = 5e-6;

export interface FilledHours {
  readonly hours: HourColumns;
  /** 1 where a slot lacked dry bulb or humidity before gaps were filled. */
  readonly gap: Uint8Array;
  /** 1 where dry bulb or humidity was filled from the days around. */
  readonly longFilled: Uint8Array;
  /** 1 where a slot has a humidity, even one that waits for a pressure. */
  readonly humidityPresent: Uint8Array;
}

/** Humidity ratio of each hour, short gaps filled, provenance of each value. */
export function hourColumns(input: {
  steps: StepColumns;
  source: HumiditySource;
  belowZero: BelowZeroPhase;
  typical: boolean;
  /** Whether gaps of 6 to 47 hours are filled as well. */
  longGaps: boolean;
}): FilledHours {
  const { source, steps } = input;
  const values = hourValues(input);
  if (isComplete(values)) return completeHours(values, source);
  const { dryBulbC, humidityRatio, pressurePa, lines } = values;
  const waiting = waitingForPressure(steps, source);
  const gap = markGaps(values, waiting);
  const longFilled = new Uint8Array(dryBulbC.length);
  const filledDry = fillColumn(dryBulbC, input, longFilled);
  if (steps.stepsPerHour === 1 && source === 'dew point') restoreHumidity(input, values, filledDry);
  const filledHumidity = fillColumn(humidityRatio, input, longFilled);
  for (let slot = 0; slot < humidityRatio.length; slot++) {
    if (filledDry[slot] === 0 && filledHumidity[slot] === 0) continue;
    const most = saturation(dryBulbC[slot], pressurePa[slot]);
    humidityRatio[slot] = Math.max(LEAST_RATIO, Math.min(humidityRatio[slot] ?? Number.NaN, most));
  }
  const flags = flagColumn({ values, source, filledDry, filledHumidity });
  const toBeFilled = willBeFilled(waiting, input.typical);
  const humidityPresent = new Uint8Array(flags.length);
  for (let slot = 0; slot < flags.length; slot++) {
    const waits = waiting[slot] === 1 || toBeFilled[slot] === 1;
    humidityPresent[slot] = Number.isNaN(humidityRatio[slot]) && !waits ? 0 : 1;
  }
  return { hours: { dryBulbC, humidityRatio, pressurePa, flags, lines }, gap, longFilled, humidityPresent };
}

/** Whether nothing is missing: what is not a number makes every sum so. */
function isComplete({ dryBulbC, humidityRatio, pressurePa }: HourValues): boolean {
  let sum = 0;
  for (let slot = 0; slot < dryBulbC.length; slot++) {
    sum += (dryBulbC[slot] ?? 0) + (humidityRatio[slot] ?? 0) + (pressurePa[slot] ?? 0);
  }
  return !Number.isNaN(sum);
}

/** A year without a gap, as most are: nothing is filled and nothing waits. */
function completeHours(values: HourValues, source: HumiditySource): FilledHours {
  const { dryBulbC, humidityRatio, lines, pressurePa } = values;
  const none = new Uint8Array(dryBulbC.length);
  const flags = flagColumn({ values, source, filledDry: none, filledHumidity: none });
  const humidityPresent = new Uint8Array(flags.length).fill(1);
  return { hours: { dryBulbC, humidityRatio, pressurePa, flags, lines }, gap: none, longFilled: none, humidityPresent };
}

/** Fills a column in place, short gaps and, where asked, long ones. @returns 1 where a slot was filled */
function fillColumn(
  column: Float64Array,
  { longGaps, typical }: { longGaps: boolean; typical: boolean },
  longFilled: Uint8Array,
): Uint8Array {
  const filled = fillShortGaps(column, typical);
  if (!longGaps) return filled;
  const long = fillLongGaps(column, typical);
  for (let slot = 0; slot < filled.length; slot++) {
    if (long[slot] === 0) continue;
    filled[slot] = 1;
    longFilled[slot] = 1;
  }
  return filled;
}

/** Marks the slots without dry bulb or humidity; a humidity that waits for a pressure is there. */
function markGaps({ dryBulbC, humidityRatio }: HourValues, waiting: Uint8Array): Uint8Array {
  const gap = new Uint8Array(dryBulbC.length);
  for (let slot = 0; slot < gap.length; slot++) {
    const humidityLacks = Number.isNaN(humidityRatio[slot]) && waiting[slot] === 0;
    if (humidityLacks || Number.isNaN(dryBulbC[slot])) gap[slot] = 1;
  }
  return gap;
}

function flagColumn(input: {
  values: HourValues;
  source: HumiditySource;
  filledDry: Uint8Array;
  filledHumidity: Uint8Array;
}): Uint8Array {
  const { filledDry, filledHumidity, source, values } = input;
  const { dryBulbC, estimated, humidityRatio, pressurePa, repaired } = values;
  const humidityBit = source === 'dew point' ? VALUE.dewPoint : VALUE.relativeHumidity;
  const flags = new Uint8Array(dryBulbC.length);
  for (let slot = 0; slot < flags.length; slot++) {
    const ours = repaired[slot] ?? 0;
    const theirs = estimated[slot] ?? 0;
    const known = !Number.isNaN((dryBulbC[slot] ?? 0) + (humidityRatio[slot] ?? 0) + (pressurePa[slot] ?? 0));
    // As in nearly every hour, all three are measured, whose code is 0.
    if (known && (ours | theirs | (filledDry[slot] ?? 0) | (filledHumidity[slot] ?? 0)) === 0) continue;
    flags[slot] = hourFlags({
      dryBulb: provenance(
        dryBulbC[slot],
        filledDry[slot] === 1 || (ours & VALUE.dryBulb) !== 0,
        theirs & VALUE.dryBulb,
      ),
      humidity: provenance(
        humidityRatio[slot],
        filledHumidity[slot] === 1 || (ours & humidityBit) !== 0,
        theirs & humidityBit,
      ),
      pressure: provenance(pressurePa[slot], (ours & VALUE.pressure) !== 0, theirs & VALUE.pressure),
    });
  }
  return flags;
}

function hourValues(input: { steps: StepColumns; source: HumiditySource; belowZero: BelowZeroPhase }): HourValues {
  const { belowZero, source, steps } = input;
  const humidityRatio = humidityRatios({ steps, dryBulbC: steps.dryBulbC, belowZero }, source);
  return steps.stepsPerHour === 1 ? { ...steps, humidityRatio } : hoursFromSteps(steps, humidityRatio);
}

/** Where only the dry bulb was missing and has been filled, the dew point of the hour still holds. */
function restoreHumidity(
  input: { steps: StepColumns; source: HumiditySource; belowZero: BelowZeroPhase },
  values: HourValues,
  filledDry: Uint8Array,
): void {
  const all = { steps: input.steps, dryBulbC: values.dryBulbC, belowZero: input.belowZero };
  if (!filledDry.includes(1)) return;
  const ratios = humidityRatios(all, input.source);
  for (let slot = 0; slot < filledDry.length; slot++) {
    if (filledDry[slot] === 1) values.humidityRatio[slot] = ratios[slot] ?? Number.NaN;
  }
}

/** 1 where an hour has a humidity but no pressure, which is so in every hour or in none. */
function waitingForPressure(steps: StepColumns, source: HumiditySource): Uint8Array {
  const waiting = new Uint8Array(steps.slotCount);
  if (!Number.isNaN(steps.pressurePa[0])) return waiting;
  const column = source === 'dew point' ? steps.dewPointC : steps.relativeHumidityPct;
  for (let step = 0; step < column.length; step++) {
    if (!Number.isNaN(column[step])) waiting[Math.floor(step / steps.stepsPerHour)] = 1;
  }
  return waiting;
}

/** Short gaps between humidities that wait are filled like any other once the pressure is known. */
function willBeFilled(waiting: Uint8Array, typical: boolean): Uint8Array {
  if (!waiting.includes(1)) return waiting;
  const column = new Float64Array(waiting.length);
  for (let slot = 0; slot < column.length; slot++) column[slot] = waiting[slot] === 1 ? 0 : Number.NaN;
  return fillShortGaps(column, typical);
}

function saturation(dryBulbC: number | undefined, pressurePa: number | undefined): number {
  if (dryBulbC === undefined || pressurePa === undefined || Number.isNaN(dryBulbC + pressurePa)) return Number.NaN;
  return saturationHumidityRatio(dryBulbC, pressurePa);
}

/** @param estimated the bit of the value where the source calls it interpolated or modelled, else 0 */
function provenance(value: number | undefined, repaired: boolean, estimated: number): Provenance {
  if (value === undefined || Number.isNaN(value)) return 'missing';
  if (repaired) return 'repaired';
  return estimated !== 0 ? 'estimated' : 'measured';
}
