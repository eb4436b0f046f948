import type { Brief } from '../brief/brief.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import { worstSpell } from '../hour-classes/worst-spell.ts';
import { monthOfEachSlot, monthStartSlots } from '../reduction/calendar.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import type { JudgedYear } from './judged-year.ts';
import type { RunResult, SupplyBin, WorstSpell } from './run-result.ts';

/** Demand and met hours by month (12) x hour of day (24), in the slots' standard time. */
export function tallyMonthHours(judged: JudgedYear): Pick<RunResult, 'demandByMonthHour' | 'metByMonthHour'> {
  const months = monthOfEachSlot(judged.slots);
  const demandByMonthHour = emptyTable();
  const metByMonthHour = emptyTable();
  for (const { slot, judgement } of judged.demandHours) {
    const month = (months[slot] ?? 1) - 1;
    add(demandByMonthHour[month], slot % HOURS_PER_DAY, 1);
    if (judgement.met) add(metByMonthHour[month], slot % HOURS_PER_DAY, 1);
  }
  return { demandByMonthHour, metByMonthHour };
}

/** Demand hours that outdoor air and each permitted stage would meet as the only one installed. */
export function tallyAloneHours(judged: JudgedYear, brief: Brief): RunResult['aloneHours'] {
  const alone: { [hourClass in (typeof hourClasses)[number]]?: number } = {};
  for (const stage of judged.use.aloneStages(brief)) alone[stage] = 0;
  for (const { judgement } of judged.demandHours) {
    for (const stage of judgement.aloneMet) alone[stage] = (alone[stage] ?? 0) + 1;
  }
  return alone;
}

/** Supply temperatures of the demand hours in bins of 1 K, without a gap between the coldest and the warmest. */
export function tallySupplyCurve(judged: JudgedYear): SupplyBin[] {
  const counts = new Map<number, number>();
  for (const { judgement } of judged.demandHours) {
    const fromC = Math.floor(judgement.supply.tempC);
    counts.set(fromC, (counts.get(fromC) ?? 0) + 1);
  }
  const bins: SupplyBin[] = [];
  for (let fromC = Math.min(...counts.keys()); fromC <= Math.max(...counts.keys()); fromC++) {
    bins.push({ fromC, hours: counts.get(fromC) ?? 0 });
  }
  return bins;
}

/** The longest run of unmet demand hours; a year made of months of several years is cut at each month's beginning. */
export function tallyWorstSpell(judged: JudgedYear, year: WeatherYear): WorstSpell | null {
  const closedCode = hourClasses.indexOf('closed');
  const unmet = new Uint8Array(judged.slots);
  const shortfallK = new Float64Array(judged.slots);
  for (const { slot, judgement } of judged.demandHours) {
    unmet[slot] = judgement.met ? 0 : 1;
    shortfallK[slot] = judgement.shortfallK;
  }
  const joined = year.year === null;
  return worstSpell({
    closed: judged.classCodes.map((code) => (code === closedCode ? 1 : 0)),
    unmet,
    shortfallK,
    joints: new Set(joined ? monthStartSlots(judged.slots).slice(1, 12) : []),
  });
}

function emptyTable(): number[][] {
  return Array.from({ length: 12 }, () => Array.from({ length: HOURS_PER_DAY }, () => 0));
}

function add(row: number[] | undefined, column: number, value: number): void {
  if (row !== undefined) row[column] = (row[column] ?? 0) + value;
}
