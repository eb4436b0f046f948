import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '../../psychrometrics/wet-bulb-line.ts';
import { VALUE } from './source-rows.ts';
import type { StepColumns } from './step-columns.ts';

/** Values of the hours of a year, NaN where missing, with the provenance bits of `StepColumns`. */
export interface HourValues {
  readonly dryBulbC: Float64Array;
  readonly humidityRatio: Float64Array;
  readonly pressurePa: Float64Array;
  readonly lines: Uint32Array;
  readonly estimated: Uint8Array;
  readonly repaired: Uint8Array;
}

/** An hour counts with three quarters of its steps. */
const FEWEST_SHARE = 0.75;

/**
 * Hours of a file with several records an hour: dry bulb and pressure are means, and the humidity ratio is the one whose
 * wet-bulb depression is the mean of the depressions, not the depression of the means.
 */
export function hoursFromSteps(steps: StepColumns, humidityRatio: Float64Array): HourValues {
  const { slotCount } = steps;
  const hours: HourValues = {
    dryBulbC: new Float64Array(slotCount).fill(Number.NaN),
    humidityRatio: new Float64Array(slotCount).fill(Number.NaN),
    pressurePa: new Float64Array(slotCount).fill(Number.NaN),
    lines: new Uint32Array(slotCount),
    estimated: new Uint8Array(slotCount),
    repaired: new Uint8Array(slotCount),
  };
  for (let slot = 0; slot < slotCount; slot++) reduceHour(steps, humidityRatio, hours, slot);
  return hours;
}

// Four arguments, since both columns and both sides belong to one inner loop.
function reduceHour(steps: StepColumns, humidityRatio: Float64Array, hours: HourValues, slot: number): void {
  const n = steps.stepsPerHour;
  const dry = { count: 0, sum: 0 };
  const wet = { count: 0, depression: 0 };
  let pressure = 0;
  for (let step = slot * n; step < (slot + 1) * n; step++) {
    const dryBulbC = steps.dryBulbC[step] ?? Number.NaN;
    const ratio = humidityRatio[step] ?? Number.NaN;
    const pressurePa = steps.pressurePa[step] ?? Number.NaN;
    pressure += pressurePa;
    if ((hours.lines[slot] ?? 0) === 0) hours.lines[slot] = steps.lines[step] ?? 0;
    // Values that are not there leave no mark; a pressure always is.
    const present = Number.isNaN(dryBulbC) ? VALUE.pressure : 0xff;
    hours.estimated[slot] = (hours.estimated[slot] ?? 0) | ((steps.estimated[step] ?? 0) & present);
    hours.repaired[slot] = (hours.repaired[slot] ?? 0) | ((steps.repaired[step] ?? 0) & present);
    if (Number.isNaN(dryBulbC)) continue;
    dry.count++;
    dry.sum += dryBulbC;
    if (Number.isNaN(ratio + pressurePa)) continue;
    wet.count++;
    wet.depression += dryBulbC - wetBulbC(dryBulbC, ratio, pressurePa);
  }
  const pressurePa = pressure / n;
  hours.pressurePa[slot] = pressurePa;
  if (dry.count < FEWEST_SHARE * n) return;
  const dryBulbC = dry.sum / dry.count;
  hours.dryBulbC[slot] = dryBulbC;
  if (wet.count < FEWEST_SHARE * n) return;
  const meanWetBulbC = dryBulbC - wet.depression / wet.count;
  hours.humidityRatio[slot] = humidityRatioOnWetBulbLine(dryBulbC, meanWetBulbC, pressurePa);
}
