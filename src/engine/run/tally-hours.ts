import type { Brief } from '../brief/brief.ts';
import type { hourClasses } from '../hour-classes/hour-class.ts';
import { worstSpell } from '../hour-classes/worst-spell.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { COLDEST_BIN_C, type HourCounts, type UnmetHours } from './count-hours.ts';
import { runningStages } from './hour-columns.ts';
import type { JudgedYear } from './judged-year.ts';
import type { RunResult, SupplyBin, WorstSpell } from './run-result.ts';

/** Demand hours that outdoor air and each permitted stage would meet as the only one installed. */
export function tallyAloneHours({ byMarks }: HourCounts, { use }: JudgedYear, brief: Brief): RunResult['aloneHours'] {
  const alone: { [hourClass in (typeof hourClasses)[number]]?: number } = {};
  for (const stage of use.aloneStages(brief)) {
    const position = runningStages.indexOf(stage);
    let met = 0;
    for (let marks = 0; marks < byMarks.length; marks++) {
      const hours = byMarks[marks] ?? 0;
      if (hours > 0 && ((marks >> position) & 1) === 1) met += hours;
    }
    alone[stage] = met;
  }
  return alone;
}

/** Supply temperatures of the demand hours in bins of 1 K, without a gap between the coldest and the warmest. */
export function tallySupplyCurve({ supplyBins, strangeSuppliesC }: HourCounts): SupplyBin[] {
  const found: SupplyBin[] = [];
  for (let bin = 0; bin < supplyBins.length; bin++) {
    const hours = supplyBins[bin] ?? 0;
    if (hours > 0) found.push({ fromC: COLDEST_BIN_C + bin, hours });
  }
  const bins = strangeSuppliesC.length === 0 ? found : withStrange(found, strangeSuppliesC);
  return withoutGaps(bins);
}

/** With supplies that no weather gives, in ascending order. */
function withStrange(found: readonly SupplyBin[], suppliesC: readonly number[]): SupplyBin[] {
  const byBin = new Map(found.map(({ fromC, hours }) => [fromC, hours]));
  for (const tempC of suppliesC) byBin.set(Math.floor(tempC), (byBin.get(Math.floor(tempC)) ?? 0) + 1);
  return [...byBin].sort(([one], [other]) => one - other).map(([fromC, hours]) => ({ fromC, hours }));
}

function withoutGaps(bins: readonly SupplyBin[]): SupplyBin[] {
  const curve: SupplyBin[] = [];
  for (const bin of bins) {
    const last = curve.at(-1)?.fromC ?? bin.fromC - 1;
    for (let fromC = last + 1; fromC < bin.fromC; fromC++) curve.push({ fromC, hours: 0 });
    curve.push(bin);
  }
  return curve;
}

/** The longest run of unmet demand hours; a year made of months of several years is cut at each month's beginning. */
export function tallyWorstSpell(
  unmet: UnmetHours,
  { slots, schedule }: JudgedYear,
  year: WeatherYear,
): WorstSpell | null {
  const periodOf = year.year === null ? monthOfEachSlot(slots) : null;
  return worstSpell(unmet, { openBefore: schedule.openBefore, periodOf });
}
