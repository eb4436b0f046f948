import type { Brief } from '../brief/brief.ts';
import type { hourClasses } from '../hour-classes/hour-class.ts';
import { worstSpell } from '../hour-classes/worst-spell.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { countCodes, inBlocks, runningStages } from './hour-columns.ts';
import type { JudgedYear } from './judged-year.ts';
import type { RunResult, SupplyBin, WorstSpell } from './run-result.ts';

/** Demand hours that outdoor air and each permitted stage would meet as the only one installed. */
export function tallyAloneHours({ hours, use }: JudgedYear, brief: Brief): RunResult['aloneHours'] {
  const byMarks = new Uint16Array(1 << runningStages.length);
  inBlocks(hours.count, (from, to) => countCodes(byMarks, hours.aloneMet, from, to));
  const alone: { [hourClass in (typeof hourClasses)[number]]?: number } = {};
  for (const stage of use.aloneStages(brief)) {
    const position = runningStages.indexOf(stage);
    let met = 0;
    for (let marks = 0; marks < byMarks.length; marks++) met += ((marks >> position) & 1) * (byMarks[marks] ?? 0);
    alone[stage] = met;
  }
  return alone;
}

/** Bins of the first look, °C: colder and warmer supplies than these are counted apart. */
const COLDEST_BIN_C = -64;
const BINS = 192;

/** Supply temperatures of the demand hours in bins of 1 K, without a gap between the coldest and the warmest. */
export function tallySupplyCurve({ hours }: Pick<JudgedYear, 'hours'>): SupplyBin[] {
  const { count, supplyC } = hours;
  const bins = new Uint16Array(BINS);
  let outside = 0;
  inBlocks(count, (from, to) => {
    outside += countBins(bins, supplyC, from, to);
  });
  if (outside > 0) return curveOfAny(supplyC.subarray(0, count));
  const first = bins.findIndex((hoursOfBin) => hoursOfBin > 0);
  const last = bins.findLastIndex((hoursOfBin) => hoursOfBin > 0);
  if (first < 0) return [];
  return Array.from(bins.subarray(first, last + 1), (found, bin) => ({
    fromC: COLDEST_BIN_C + first + bin,
    hours: found,
  }));
}

/** Counts supplies by bin. @returns how many lie outside the bins */
function countBins(bins: Uint16Array, supplyC: Float64Array, from: number, to: number): number {
  let outside = 0;
  for (let at = from; at < to; at++) {
    const bin = (Math.floor(supplyC[at] ?? Number.NaN) - COLDEST_BIN_C) | 0;
    // What is no number, or too large for a whole one, ends in bin 0.
    if (bin > 0 && bin < BINS) bins[bin] = (bins[bin] ?? 0) + 1;
    else outside++;
  }
  return outside;
}

/** The same of supplies that no weather gives. */
function curveOfAny(supplyC: Float64Array): SupplyBin[] {
  const lowestC = supplyC.reduce((lowest, tempC) => Math.min(lowest, Math.floor(tempC)), Number.POSITIVE_INFINITY);
  const highestC = supplyC.reduce((highest, tempC) => Math.max(highest, Math.floor(tempC)), Number.NEGATIVE_INFINITY);
  const bins = new Uint32Array(highestC - lowestC + 1);
  for (const tempC of supplyC) {
    const bin = Math.floor(tempC) - lowestC;
    bins[bin] = (bins[bin] ?? 0) + 1;
  }
  return Array.from(bins, (found, bin) => ({ fromC: lowestC + bin, hours: found }));
}

/** The longest run of unmet demand hours; a year made of months of several years is cut at each month's beginning. */
export function tallyWorstSpell({ slots, schedule, hours }: JudgedYear, year: WeatherYear): WorstSpell | null {
  const periodOf = year.year === null ? monthOfEachSlot(slots) : null;
  return worstSpell(hours, { openBefore: schedule.openBefore, periodOf });
}
