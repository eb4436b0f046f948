import { HOURS_PER_DAY } from '../conventions.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import { type HourColumns, inBlocks } from '../run/hour-columns.ts';
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

interface WaterSums {
  evaporatedLitres: number;
  makeUpLitres: number;
  coolingKwh: number;
  peakHourLitres: number;
  readonly byMonth: Float64Array;
  readonly byDay: Float64Array;
}

function tallyWater(slots: number, hours: PlantColumns): RunResult['water'] {
  const months = monthOfEachSlot(slots);
  const sums: WaterSums = {
    ...{ evaporatedLitres: 0, makeUpLitres: 0, coolingKwh: 0, peakHourLitres: 0 },
    byMonth: new Float64Array(12),
    byDay: new Float64Array(slots / HOURS_PER_DAY),
  };
  inBlocks(hours.count, (from, to) => addWater(sums, hours, months, from, to));
  const { evaporatedLitres, makeUpLitres, coolingKwh, peakHourLitres } = sums;
  const worstMonth = peakOf(sums.byMonth);
  const peakDay = peakOf(sums.byDay);
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

function addWater(sums: WaterSums, hours: PlantColumns, months: Uint8Array, from: number, to: number): void {
  let { evaporatedLitres, makeUpLitres, coolingKwh, peakHourLitres } = sums;
  const { byMonth, byDay } = sums;
  for (let at = from; at < to; at++) {
    coolingKwh += hours.coolingKwh[at] ?? 0;
    const madeUp = hours.makeUpLitres[at] ?? 0;
    if (madeUp === 0) continue;
    const slot = hours.slot[at] ?? 0;
    evaporatedLitres += hours.evaporatedLitres[at] ?? 0;
    makeUpLitres += madeUp;
    peakHourLitres = Math.max(peakHourLitres, madeUp);
    const month = (months[slot] ?? 1) - 1;
    const day = (slot / HOURS_PER_DAY) | 0;
    byMonth[month] = (byMonth[month] ?? 0) + madeUp;
    byDay[day] = (byDay[day] ?? 0) + madeUp;
  }
  sums.evaporatedLitres = evaporatedLitres;
  sums.makeUpLitres = makeUpLitres;
  sums.coolingKwh = coolingKwh;
  sums.peakHourLitres = peakHourLitres;
}

function tallyElectricity(hours: PlantColumns): Electricity {
  const sums = { kwh: 0, referenceKwh: 0, peakKw: 0, referencePeakKw: 0, backUpKw: 0 };
  inBlocks(hours.count, (from, to) => addElectricity(sums, hours, from, to));
  const { kwh, referenceKwh, peakKw, referencePeakKw, backUpKw } = sums;
  const savedPct = referenceKwh > 0 ? (100 * (referenceKwh - kwh)) / referenceKwh : null;
  return { kwh, referenceKwh, savedPct, peakKw, referencePeakKw, backUpKw };
}

type ElectricitySums = { -readonly [Sum in keyof Omit<Electricity, 'savedPct'>]: number };

function addElectricity(sums: ElectricitySums, hours: PlantColumns, from: number, to: number): void {
  let { kwh, referenceKwh, peakKw, referencePeakKw, backUpKw } = sums;
  for (let at = from; at < to; at++) {
    const drawn = hours.kwh[at] ?? 0;
    const reference = hours.referenceKwh[at] ?? 0;
    kwh += drawn;
    referenceKwh += reference;
    peakKw = Math.max(peakKw, drawn);
    referencePeakKw = Math.max(referencePeakKw, reference);
    backUpKw = Math.max(backUpKw, hours.backUpKw[at] ?? 0);
  }
  sums.kwh = kwh;
  sums.referenceKwh = referenceKwh;
  sums.peakKw = peakKw;
  sums.referencePeakKw = referencePeakKw;
  sums.backUpKw = backUpKw;
}

/** The first greatest value over 0 with its place; null when none is over 0. */
function peakOf(values: Float64Array): { place: number; value: number } | null {
  let place = -1;
  let peak = 0;
  for (let index = 0; index < values.length; index++) {
    const value = values[index] ?? 0;
    if (!(value > peak)) continue;
    place = index;
    peak = value;
  }
  return place < 0 ? null : { place, value: peak };
}
