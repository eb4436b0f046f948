import { dewPointC, vapourPressurePa } from '../psychrometrics/moist-air.ts';
import { tabledDewPointC, tabledSaturationPa } from '../psychrometrics/saturation-table.ts';
import type { YearColumns } from './packed-columns.ts';

/** The most frequent of the design percentages, over which values and their surroundings are needed. */
const HIGH_SHARE = 0.1;
/** Half a kelvin round a design value, and what the grains of comparison and table may move. */
const AROUND_K = 0.55;
const MARGIN_K = 0.05;
/** The vapour is counted so finely, Pa, up to a dew point of 41 °C. */
const STEP_PA = 4;
const STEPS = 2_000;

/**
 * Dew points, °C (frost points below 0 °C), of the slots that decide the design values of a year: those of its highest tenth and
 * those within half a kelvin below. -Infinity where the dew point is lower than any of them, NaN where something is missing. The
 * vapour's pressure, of which nearly nothing has to be computed, tells which slots they are.
 */
export function highDewPoints(columns: YearColumns): Float64Array {
  const { humidityRatio, pressurePa } = columns;
  const vapourPa = new Float64Array(columns.dryBulbC.length);
  for (let slot = 0; slot < vapourPa.length; slot++) {
    vapourPa[slot] = vapourPressurePa(humidityRatio[slot] ?? Number.NaN, pressurePa[slot] ?? Number.NaN);
  }
  const floorC = tabledDewPointC(lowestOfHighPa(vapourPa)) - AROUND_K - MARGIN_K;
  const high = dewPointsOver(Number.isNaN(floorC) ? 0 : tabledSaturationPa(floorC), columns, vapourPa);
  // Air over saturation has the dew point of its dry bulb, and its vapour says too much of it.
  return isEnough(high, floorC + AROUND_K) ? high : dewPointsOver(0, columns, vapourPa);
}

/** A pressure, Pa, that the vapour of a tenth of the known slots reaches. */
function lowestOfHighPa(vapourPa: Float64Array): number {
  const counts = new Uint16Array(STEPS + 1);
  let known = 0;
  for (let slot = 0; slot < vapourPa.length; slot++) {
    const value = vapourPa[slot] ?? Number.NaN;
    if (Number.isNaN(value)) continue;
    known++;
    const step = Math.min(STEPS, value / STEP_PA) | 0;
    counts[step] = (counts[step] ?? 0) + 1;
  }
  let step = STEPS;
  for (let above = counts[step] ?? 0; above <= HIGH_SHARE * known && step > 0; above += counts[step] ?? 0) step--;
  return step * STEP_PA;
}

function dewPointsOver(floorPa: number, columns: YearColumns, vapourPa: Float64Array): Float64Array {
  const { dryBulbC, humidityRatio, pressurePa } = columns;
  const high = new Float64Array(vapourPa.length);
  for (let slot = 0; slot < high.length; slot++) {
    const vapour = vapourPa[slot] ?? Number.NaN;
    const dryBulb = dryBulbC[slot] ?? Number.NaN;
    high[slot] = Number.isNaN(vapour + dryBulb)
      ? Number.NaN
      : vapour < floorPa
        ? Number.NEGATIVE_INFINITY
        : dewPointC(dryBulb, humidityRatio[slot] ?? Number.NaN, pressurePa[slot] ?? Number.NaN);
  }
  return high;
}

/** Whether more than a tenth of the known slots reach a dew point. */
function isEnough(dewPointsC: Float64Array, leastC: number): boolean {
  let known = 0;
  let reached = 0;
  for (let slot = 0; slot < dewPointsC.length; slot++) {
    const value = dewPointsC[slot] ?? Number.NaN;
    if (Number.isNaN(value)) continue;
    known++;
    if (value >= leastC) reached++;
  }
  return reached > HIGH_SHARE * known;
}
