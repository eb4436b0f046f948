import { HOURS_PER_DAY, SLOTS_PER_LEAP_YEAR } from '../conventions.ts';
import { block } from '../run/hour-block.ts';
import type { Electricity, RunResult } from '../run/run-result.ts';

/** Water and electricity of a year so far, per kW of design load; of the greatest hours the first of equals. */
export interface PlantSums {
  evaporatedLitres: number;
  makeUpLitres: number;
  coolingKwh: number;
  peakHourLitres: number;
  kwh: number;
  referenceKwh: number;
  peakKw: number;
  referencePeakKw: number;
  backUpKw: number;
  readonly litresByMonth: Float64Array;
  readonly litresByDay: Float64Array;
}

const now: PlantSums = {
  ...{ evaporatedLitres: 0, makeUpLitres: 0, coolingKwh: 0, peakHourLitres: 0 },
  ...{ kwh: 0, referenceKwh: 0, peakKw: 0, referencePeakKw: 0, backUpKw: 0 },
  litresByMonth: new Float64Array(12),
  litresByDay: new Float64Array(SLOTS_PER_LEAP_YEAR / HOURS_PER_DAY),
};

/** Of the year that is judged; they belong to the next one as soon as that begins. */
export const plantSums = now;

/** Begins a year. @returns its sums */
export function noPlant(): PlantSums {
  Object.assign(now, { evaporatedLitres: 0, makeUpLitres: 0, coolingKwh: 0, peakHourLitres: 0 });
  Object.assign(now, { kwh: 0, referenceKwh: 0, peakKw: 0, referencePeakKw: 0, backUpKw: 0 });
  now.litresByMonth.fill(0);
  now.litresByDay.fill(0);
  return now;
}

/** Constants of this module: see `hour-block.ts`. */
const { slot: slots, evaporatedLitres: evaporated, makeUpLitres: madeUp } = block;
const { coolingKwh: cooled, kwh: drawn, referenceKwh: reference, backUpKw: backUp } = block;
const { litresByMonth, litresByDay } = now;

/**
 * Adds the hours of `block`: sums run hour by hour, in slot order, wherever a block ends.
 * @param monthOf month, 1 to 12, of every slot of the year
 */
export function addPlant(monthOf: Uint8Array): void {
  const { count } = block;
  let { coolingKwh, kwh, referenceKwh, peakKw, referencePeakKw, backUpKw } = now;
  let { evaporatedLitres, makeUpLitres, peakHourLitres } = now;
  for (let at = 0; at < count; at++) {
    const drawnKw = drawn[at] ?? 0;
    const referenceKw = reference[at] ?? 0;
    coolingKwh += cooled[at] ?? 0;
    kwh += drawnKw;
    referenceKwh += referenceKw;
    const leftKw = backUp[at] ?? 0;
    if (drawnKw > peakKw) peakKw = drawnKw;
    if (referenceKw > referencePeakKw) referencePeakKw = referenceKw;
    if (leftKw > backUpKw) backUpKw = leftKw;
    const litres = madeUp[at] ?? 0;
    if (litres === 0) continue;
    const slot = slots[at] ?? 0;
    evaporatedLitres += evaporated[at] ?? 0;
    makeUpLitres += litres;
    if (litres > peakHourLitres) peakHourLitres = litres;
    const month = (monthOf[slot] ?? 1) - 1;
    const day = (slot / HOURS_PER_DAY) | 0;
    litresByMonth[month] = (litresByMonth[month] ?? 0) + litres;
    litresByDay[day] = (litresByDay[day] ?? 0) + litres;
  }
  now.coolingKwh = coolingKwh;
  now.kwh = kwh;
  now.referenceKwh = referenceKwh;
  now.peakKw = peakKw;
  now.referencePeakKw = referencePeakKw;
  now.backUpKw = backUpKw;
  now.evaporatedLitres = evaporatedLitres;
  now.makeUpLitres = makeUpLitres;
  now.peakHourLitres = peakHourLitres;
}

/** Water and electricity of the year per kW of design load (method 6); the first of equals is the peak. */
export function plantOfYear(
  sums: PlantSums,
  { countsElectricity }: { countsElectricity: boolean },
): Pick<RunResult, 'water' | 'electricity'> {
  return { water: waterOf(sums), electricity: countsElectricity ? electricityOf(sums) : null };
}

function waterOf(sums: PlantSums): RunResult['water'] {
  const { evaporatedLitres, makeUpLitres, coolingKwh, peakHourLitres } = sums;
  const worstMonth = peakOf(sums.litresByMonth);
  const peakDay = peakOf(sums.litresByDay);
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

function electricityOf({ kwh, referenceKwh, peakKw, referencePeakKw, backUpKw }: PlantSums): Electricity {
  const savedPct = referenceKwh > 0 ? (100 * (referenceKwh - kwh)) / referenceKwh : null;
  return { kwh, referenceKwh, savedPct, peakKw, referencePeakKw, backUpKw };
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
