import { type HourColumns, runningStages } from '../hour-columns.ts';
import type { RoomPlan } from './room-plan.ts';

const AIR = runningStages.indexOf('air');

/** Water and electricity of every hour, method 6, per kW of design load: `supplyAirPlantHour` on columns. */
export function roomPlant(plan: RoomPlan, hours: HourColumns, from: number, to: number): void {
  const { economy, kwhPerKwh, litresPerRatio, makeUpPerEvaporated, pumpKwPerKw, fanKwhPerVolume } = plan;
  const airKwhPerVolume = fanKwhPerVolume[AIR] ?? 0;
  for (let at = from; at < to; at++) {
    const volume = hours.volumeM3PerKg[at] ?? 0;
    const loadFraction = hours.loadFraction[at] ?? 0;
    const carried = hours.carriedShare[at] ?? 0;
    const running = hours.running[at] ?? 0;
    const evaporatedLitres = litresPerRatio * (hours.evaporatedKgPerKg[at] ?? 0);
    const backUpKw = loadFraction * (1 - carried);
    const pumpKw = running === AIR ? 0 : pumpKwPerKw * loadFraction;
    const rests = economy && hours.airMeets[at] === 1;
    hours.evaporatedLitres[at] = evaporatedLitres;
    hours.makeUpLitres[at] = evaporatedLitres * makeUpPerEvaporated;
    hours.coolingKwh[at] = loadFraction * carried;
    hours.kwh[at] = (fanKwhPerVolume[running] ?? 0) * volume + pumpKw + backUpKw * kwhPerKwh;
    hours.referenceKwh[at] = airKwhPerVolume * volume + (rests ? 0 : loadFraction * kwhPerKwh);
    hours.backUpKw[at] = backUpKw;
  }
}
