import { HOURS_PER_DAY } from '../conventions.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { HourColumns } from '../run/hour-columns.ts';
import type { Electricity, RunResult } from '../run/run-result.ts';

/** The plant of each demand hour. */
export type PlantColumns = Pick<
  HourColumns,
  'count' | 'slot' | 'evaporatedLitres' | 'makeUpLitres' | 'coolingKwh' | 'kwh' | 'referenceKwh' | 'backUpKw'
>;

/** Water and electricity of the year per kW of design load (method 6); the first of equals is the peak. */
export function tallyPlant(
  slots: number,
  hours: PlantColumns,
  { countsElectricity }: { countsElectricity: boolean },
): Pick<RunResult, 'water' | 'electricity'> {
  return {
    water: tallyWater(slots, hours),
    electricity: countsElectricity ? tallyElectricity(hours) : null,
  };
}

function tallyWater(slots: number, hours: PlantColumns): RunResult['water'] {
  const months = monthOfEachSlot(slots);
  const byMonth = new Float64Array(12);
  const byDay = new Float64Array(slots / HOURS_PER_DAY);
  let evaporatedLitres = 0;
  let makeUpLitres = 0;
  let coolingKwh = 0;
  let peakHourLitres = 0;
  for (let at = 0; at < hours.count; at++) {
    const slot = hours.slot[at] ?? 0;
    const madeUp = hours.makeUpLitres[at] ?? 0;
    evaporatedLitres += hours.evaporatedLitres[at] ?? 0;
    makeUpLitres += madeUp;
    coolingKwh += hours.coolingKwh[at] ?? 0;
    peakHourLitres = Math.max(peakHourLitres, madeUp);
    const month = (months[slot] ?? 1) - 1;
    const day = Math.floor(slot / HOURS_PER_DAY);
    byMonth[month] = (byMonth[month] ?? 0) + madeUp;
    byDay[day] = (byDay[day] ?? 0) + madeUp;
  }
  const worstMonth = peakOf(byMonth);
  const peakDay = peakOf(byDay);
  return {
    makeUpLitres,
    evaporatedLitres,
    litresPerKwh: coolingKwh > 0 ? makeUpLitres / coolingKwh : null,
    worstMonthLitres: worstMonth?.value ?? 0,
    worstMonth: worstMonth === null ? null : worstMonth.place + 1,
    peakDayLitres: peakDay?.value ?? 0,
    peakDay: peakDay?.place ?? null,
    peakHourLitres,
    coolingKwh,
  };
}

function tallyElectricity(hours: PlantColumns): Electricity {
  let kwh = 0;
  let referenceKwh = 0;
  let peakKw = 0;
  let referencePeakKw = 0;
  let backUpKw = 0;
  for (let at = 0; at < hours.count; at++) {
    const drawn = hours.kwh[at] ?? 0;
    const reference = hours.referenceKwh[at] ?? 0;
    kwh += drawn;
    referenceKwh += reference;
    peakKw = Math.max(peakKw, drawn);
    referencePeakKw = Math.max(referencePeakKw, reference);
    backUpKw = Math.max(backUpKw, hours.backUpKw[at] ?? 0);
  }
  const savedPct = referenceKwh > 0 ? (100 * (referenceKwh - kwh)) / referenceKwh : null;
  return { kwh, referenceKwh, savedPct, peakKw, referencePeakKw, backUpKw };
}

/** The first greatest value over 0 with its place; null when none is over 0. */
function peakOf(values: Float64Array): { place: number; value: number } | null {
  let peak: { place: number; value: number } | null = null;
  for (const [place, value] of values.entries()) if (value > (peak?.value ?? 0)) peak = { place, value };
  return peak;
}
