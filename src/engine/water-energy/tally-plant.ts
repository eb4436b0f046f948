import { HOURS_PER_DAY } from '../conventions.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { Electricity, RunResult } from '../run/run-result.ts';
import type { PlantHour } from './plant-hour.ts';

/** The plant's hour at a slot (0 first). */
export interface PlantSlot {
  readonly slot: number;
  readonly plant: PlantHour;
}

/** Water and electricity of the year per kW of design load (method 6); the first of equals is the peak. */
export function tallyPlant(
  slots: number,
  plantSlots: readonly PlantSlot[],
  { countsElectricity }: { countsElectricity: boolean },
): Pick<RunResult, 'water' | 'electricity'> {
  return {
    water: tallyWater(slots, plantSlots),
    electricity: countsElectricity ? tallyElectricity(plantSlots) : null,
  };
}

function tallyWater(slots: number, plantSlots: readonly PlantSlot[]): RunResult['water'] {
  const months = monthOfEachSlot(slots);
  const byMonth = new Float64Array(12);
  const byDay = new Float64Array(slots / HOURS_PER_DAY);
  let evaporatedLitres = 0;
  let makeUpLitres = 0;
  let coolingKwh = 0;
  let peakHourLitres = 0;
  for (const { slot, plant } of plantSlots) {
    evaporatedLitres += plant.evaporatedLitres;
    makeUpLitres += plant.makeUpLitres;
    coolingKwh += plant.coolingKwh;
    peakHourLitres = Math.max(peakHourLitres, plant.makeUpLitres);
    const month = (months[slot] ?? 1) - 1;
    const day = Math.floor(slot / HOURS_PER_DAY);
    byMonth[month] = (byMonth[month] ?? 0) + plant.makeUpLitres;
    byDay[day] = (byDay[day] ?? 0) + plant.makeUpLitres;
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

function tallyElectricity(plantSlots: readonly PlantSlot[]): Electricity {
  let kwh = 0;
  let referenceKwh = 0;
  let peakKw = 0;
  let referencePeakKw = 0;
  let backUpKw = 0;
  for (const { plant } of plantSlots) {
    kwh += plant.kwh ?? 0;
    referenceKwh += plant.referenceKwh ?? 0;
    peakKw = Math.max(peakKw, plant.kwh ?? 0);
    referencePeakKw = Math.max(referencePeakKw, plant.referenceKwh ?? 0);
    backUpKw = Math.max(backUpKw, plant.backUpKw);
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
