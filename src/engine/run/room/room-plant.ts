import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import type { RoomPlan } from './room-plan.ts';

const AIR = runningStages.indexOf('air');

/** Constants of this module: see `hour-block.ts`. */
const { volumeM3PerKg, loadFraction, carriedShare, running, airMeets, evaporatedKgPerKg } = block;
const { evaporatedLitres, makeUpLitres, coolingKwh, kwh, referenceKwh, backUpKw } = block;

/** Water and electricity of every hour, method 6, per kW of design load: `supplyAirPlantHour` on columns. */
export function roomPlant(plan: RoomPlan): void {
  const { economy, kwhPerKwh, litresPerRatio, makeUpPerEvaporated, pumpKwPerKw, fanKwhPerVolume } = plan;
  const { count } = block;
  const airKwhPerVolume = fanKwhPerVolume[AIR] ?? 0;
  for (let at = 0; at < count; at++) {
    const volume = volumeM3PerKg[at] ?? 0;
    const load = loadFraction[at] ?? 0;
    const carried = carriedShare[at] ?? 0;
    const stage = running[at] ?? 0;
    const litres = litresPerRatio * (evaporatedKgPerKg[at] ?? 0);
    const leftKw = load * (1 - carried);
    const pumpKw = stage === AIR ? 0 : pumpKwPerKw * load;
    const rests = economy && airMeets[at] === 1;
    evaporatedLitres[at] = litres;
    makeUpLitres[at] = litres * makeUpPerEvaporated;
    coolingKwh[at] = load * carried;
    kwh[at] = (fanKwhPerVolume[stage] ?? 0) * volume + pumpKw + leftKw * kwhPerKwh;
    referenceKwh[at] = airKwhPerVolume * volume + (rests ? 0 : load * kwhPerKwh);
    backUpKw[at] = leftKw;
  }
}
