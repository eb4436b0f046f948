import { type BelowZeroPhase, saturationHumidityRatio } from '../../psychrometrics/moist-air.ts';
import { hourFlags, type Provenance } from '../../reduction/hour-flags.ts';
import type { HourColumns } from '../weather-file-reading.ts';
import { fillShortGaps } from './fill-gaps.ts';
import { type HourValues, hoursFromSteps } from './hours-from-steps.ts';
import { type HumiditySource, humidityRatios } from './humidity-choice.ts';
import { VALUE } from './source-rows.ts';
import type { StepColumns } from './step-columns.ts';

export interface FilledHours {
  readonly hours: HourColumns;
  /** 1 where a slot lacked dry bulb or humidity before gaps were filled. */
  readonly gap: Uint8Array;
  /** 1 where a slot has a humidity, even one that waits for a pressure. */
  readonly humidityPresent: Uint8Array;
}

/** Humidity ratio of each hour, short gaps filled, provenance of each value. */
export function hourColumns(input: {
  steps: StepColumns;
  source: HumiditySource;
  belowZero: BelowZeroPhase;
  typical: boolean;
}): FilledHours {
  const { source, steps, typical } = input;
  const values = hourValues(input);
  const { dryBulbC, humidityRatio, pressurePa, lines } = values;
  const waiting = waitingForPressure(steps, source);
  const lacked = (slot: number) =>
    Number.isNaN(dryBulbC[slot]) || (Number.isNaN(humidityRatio[slot]) && waiting[slot] === 0);
  const gap = Uint8Array.from(dryBulbC, (_value, slot) => (lacked(slot) ? 1 : 0));
  const filledDry = fillShortGaps(dryBulbC, typical);
  if (steps.stepsPerHour === 1 && source === 'dew point') restoreHumidity(input, values, filledDry);
  const filledHumidity = fillShortGaps(humidityRatio, typical);
  for (let slot = 0; slot < humidityRatio.length; slot++) {
    if (filledDry[slot] === 0 && filledHumidity[slot] === 0) continue;
    const most = saturation(dryBulbC[slot], pressurePa[slot]);
    humidityRatio[slot] = Math.min(humidityRatio[slot] ?? Number.NaN, most);
  }
  const humidityBit = source === 'dew point' ? VALUE.dewPoint : VALUE.relativeHumidity;
  const flags = Uint8Array.from(dryBulbC, (value, slot) => {
    const of = provenanceOf(values, slot);
    return hourFlags({
      dryBulb: of({ value, bit: VALUE.dryBulb, filled: filledDry[slot] === 1 }),
      humidity: of({ value: humidityRatio[slot], bit: humidityBit, filled: filledHumidity[slot] === 1 }),
      pressure: of({ value: pressurePa[slot], bit: VALUE.pressure, filled: false }),
    });
  });
  const humidityPresent = Uint8Array.from(humidityRatio, (ratio, slot) =>
    Number.isNaN(ratio) && waiting[slot] === 0 ? 0 : 1,
  );
  return { hours: { dryBulbC, humidityRatio, pressurePa, flags, lines }, gap, humidityPresent };
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
  const column = source === 'dew point' ? steps.dewPointC : steps.relativeHumidityPct;
  for (let step = 0; step < column.length; step++) {
    const waits = !Number.isNaN(column[step]) && Number.isNaN(steps.pressurePa[step]);
    if (waits) waiting[Math.floor(step / steps.stepsPerHour)] = 1;
  }
  return waiting;
}

function saturation(dryBulbC: number | undefined, pressurePa: number | undefined): number {
  if (dryBulbC === undefined || pressurePa === undefined || Number.isNaN(dryBulbC + pressurePa)) return Number.NaN;
  return saturationHumidityRatio(dryBulbC, pressurePa);
}

function provenanceOf(
  values: HourValues,
  slot: number,
): (input: { value: number | undefined; bit: number; filled: boolean }) => Provenance {
  const repaired = values.repaired[slot] ?? 0;
  const estimated = values.estimated[slot] ?? 0;
  return ({ bit, filled, value }) => {
    if (value === undefined || Number.isNaN(value)) return 'missing';
    if (filled || (repaired & bit) !== 0) return 'repaired';
    return (estimated & bit) !== 0 ? 'estimated' : 'measured';
  };
}
