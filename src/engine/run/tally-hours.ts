import type { Brief } from '../brief/brief.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import { worstSpell } from '../hour-classes/worst-spell.ts';
import { monthOfEachSlot, monthStartSlots } from '../reduction/calendar.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { runningStages } from './hour-columns.ts';
import type { JudgedYear } from './judged-year.ts';
import type { RunResult, SupplyBin, WorstSpell } from './run-result.ts';

const CLOSED = hourClasses.indexOf('closed');

/** Demand and met hours by month (12) x hour of day (24), in the slots' standard time. */
export function tallyMonthHours({ slots, hours }: JudgedYear): Pick<RunResult, 'demandByMonthHour' | 'metByMonthHour'> {
  const months = monthOfEachSlot(slots);
  const demandByMonthHour = emptyTable();
  const metByMonthHour = emptyTable();
  for (let at = 0; at < hours.count; at++) {
    const slot = hours.slot[at] ?? 0;
    const month = (months[slot] ?? 1) - 1;
    add(demandByMonthHour[month], slot % HOURS_PER_DAY, 1);
    add(metByMonthHour[month], slot % HOURS_PER_DAY, hours.met[at] ?? 0);
  }
  return { demandByMonthHour, metByMonthHour };
}

/** Demand hours that outdoor air and each permitted stage would meet as the only one installed. */
export function tallyAloneHours({ hours, use }: JudgedYear, brief: Brief): RunResult['aloneHours'] {
  const alone: { [hourClass in (typeof hourClasses)[number]]?: number } = {};
  for (const stage of use.aloneStages(brief)) {
    const position = runningStages.indexOf(stage);
    let met = 0;
    for (let at = 0; at < hours.count; at++) met += ((hours.aloneMet[at] ?? 0) >> position) & 1;
    alone[stage] = met;
  }
  return alone;
}

/** Supply temperatures of the demand hours in bins of 1 K, without a gap between the coldest and the warmest. */
export function tallySupplyCurve({ hours }: JudgedYear): SupplyBin[] {
  let lowestC = Number.POSITIVE_INFINITY;
  let highestC = Number.NEGATIVE_INFINITY;
  for (let at = 0; at < hours.count; at++) {
    const fromC = Math.floor(hours.supplyC[at] ?? Number.NaN);
    lowestC = Math.min(lowestC, fromC);
    highestC = Math.max(highestC, fromC);
  }
  if (hours.count === 0) return [];
  const bins = new Uint32Array(highestC - lowestC + 1);
  for (let at = 0; at < hours.count; at++) {
    const bin = Math.floor(hours.supplyC[at] ?? Number.NaN) - lowestC;
    bins[bin] = (bins[bin] ?? 0) + 1;
  }
  return Array.from(bins, (count, bin) => ({ fromC: lowestC + bin, hours: count }));
}

/** The longest run of unmet demand hours; a year made of months of several years is cut at each month's beginning. */
export function tallyWorstSpell({ slots, classCodes, hours }: JudgedYear, year: WeatherYear): WorstSpell | null {
  const closed = new Uint8Array(slots);
  const unmet = new Uint8Array(slots);
  const shortfallK = new Float64Array(slots);
  for (let slot = 0; slot < slots; slot++) closed[slot] = classCodes[slot] === CLOSED ? 1 : 0;
  for (let at = 0; at < hours.count; at++) {
    const slot = hours.slot[at] ?? 0;
    unmet[slot] = 1 - (hours.met[at] ?? 0);
    shortfallK[slot] = hours.shortfallK[at] ?? 0;
  }
  const joined = year.year === null;
  return worstSpell({
    closed,
    unmet,
    shortfallK,
    joints: new Set(joined ? monthStartSlots(slots).slice(1, 12) : []),
  });
}

function emptyTable(): number[][] {
  return Array.from({ length: 12 }, () => Array.from({ length: HOURS_PER_DAY }, () => 0));
}

function add(row: number[] | undefined, column: number, value: number): void {
  if (row !== undefined) row[column] = (row[column] ?? 0) + value;
}
