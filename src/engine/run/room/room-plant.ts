import { HOURS_PER_DAY } from '../../conventions.ts';
import { plantSums } from '../../water-energy/tally-plant.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import type { RoomPlan } from './room-plan.ts';

const AIR = runningStages.indexOf('air');

/** Constants of this module: see `hour-block.ts`. */
const { slot: slots, volumeM3PerKg, loadFraction, carriedShare, running, airMeets, evaporatedKgPerKg } = block;
const { evaporatedLitres, makeUpLitres, coolingKwh, kwh, referenceKwh, backUpKw } = block;
const sums = plantSums;
const { litresByMonth, litresByDay } = plantSums;

/**
 * Water and electricity of every hour, method 6, per kW of design load: `supplyAirPlantHour` on columns, added to the sums of the year as
 * `addPlant` does, in one loop: figures that are only added up need not go through memory.
 * @param monthOf month, 1 to 12, of every slot of the year
 * @param keepsHours whether the figures of each hour are written down too
 */
export function roomPlant(plan: RoomPlan, monthOf: Uint8Array, keepsHours: boolean): void {
  const { economy, kwhPerKwh, pumpKwPerKw, fanKwhPerVolume } = plan;
  const { count } = block;
  const airKwhPerVolume = fanKwhPerVolume[AIR] ?? 0;
  let { coolingKwh: cooled, kwh: drawn, referenceKwh: reference, peakKw, referencePeakKw, backUpKw: mostLeftKw } = sums;
  for (let at = 0; at < count; at++) {
    const volume = volumeM3PerKg[at] ?? 0;
    const load = loadFraction[at] ?? 0;
    const carried = carriedShare[at] ?? 0;
    const stage = running[at] ?? 0;
    const leftKw = load * (1 - carried);
    const pumpKw = stage === AIR ? 0 : pumpKwPerKw * load;
    const rests = economy && airMeets[at] === 1;
    const coolingKw = load * carried;
    const drawnKw = (fanKwhPerVolume[stage] ?? 0) * volume + pumpKw + leftKw * kwhPerKwh;
    const referenceKw = airKwhPerVolume * volume + (rests ? 0 : load * kwhPerKwh);
    cooled += coolingKw;
    drawn += drawnKw;
    reference += referenceKw;
    if (drawnKw > peakKw) peakKw = drawnKw;
    if (referenceKw > referencePeakKw) referencePeakKw = referenceKw;
    if (leftKw > mostLeftKw) mostLeftKw = leftKw;
    if (!keepsHours) continue;
    coolingKwh[at] = coolingKw;
    kwh[at] = drawnKw;
    referenceKwh[at] = referenceKw;
    backUpKw[at] = leftKw;
  }
  sums.coolingKwh = cooled;
  sums.kwh = drawn;
  sums.referenceKwh = reference;
  sums.peakKw = peakKw;
  sums.referencePeakKw = referencePeakKw;
  sums.backUpKw = mostLeftKw;
  addWater(plan, monthOf, keepsHours);
}

function addWater({ litresPerRatio, makeUpPerEvaporated }: RoomPlan, monthOf: Uint8Array, keepsHours: boolean): void {
  const { count } = block;
  let { evaporatedLitres: evaporated, makeUpLitres: madeUp, peakHourLitres } = sums;
  for (let at = 0; at < count; at++) {
    const litres = litresPerRatio * (evaporatedKgPerKg[at] ?? 0);
    const made = litres * makeUpPerEvaporated;
    if (keepsHours) {
      evaporatedLitres[at] = litres;
      makeUpLitres[at] = made;
    }
    if (made === 0) continue;
    const slot = slots[at] ?? 0;
    evaporated += litres;
    madeUp += made;
    if (made > peakHourLitres) peakHourLitres = made;
    const month = (monthOf[slot] ?? 1) - 1;
    const day = (slot / HOURS_PER_DAY) | 0;
    litresByMonth[month] = (litresByMonth[month] ?? 0) + made;
    litresByDay[day] = (litresByDay[day] ?? 0) + made;
  }
  sums.evaporatedLitres = evaporated;
  sums.makeUpLitres = madeUp;
  sums.peakHourLitres = peakHourLitres;
}
