import type { Brief } from '../../brief/brief.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../../stages/stage-path.ts';
import { SECONDS_PER_HOUR } from '../../water-energy/plant-hour.ts';
import { type HourColumns, runningStages } from '../hour-columns.ts';

const AIR = runningStages.indexOf('air');

/** A constant stream of air that carries the load. */
export interface AirStream {
  /** Rise over which it carries the design load, K. */
  readonly riseK: number;
  /** W per L/s by what runs, by position in `runningStages`; and of the reference. */
  readonly fanWPerLs: Float64Array;
  readonly referenceFanWPerLs: number;
}

/** Method 6 for many hours served by a stream of air: `air-plant-hour.ts` in columns, figure by figure; a test holds them together. */
export function fillAirPlant(brief: Brief, stream: AirStream, hours: HourColumns): void {
  const airflowKgPerS = 1 / (DRY_AIR_KJ_PER_KG_K * stream.riseK);
  const { pumpKwPerKw, cycles } = brief;
  const { cop, economy } = brief.reference;
  const { fanWPerLs, referenceFanWPerLs } = stream;
  for (let at = 0; at < hours.count; at++) {
    const load = hours.loadFraction[at] ?? 0;
    const carried = hours.carriedShare[at] ?? 0;
    const running = hours.running[at] ?? 0;
    const airflowM3PerS = airflowKgPerS * (hours.volumeM3PerKg[at] ?? 0);
    const evaporated = airflowKgPerS * (hours.evaporatedKgPerKg[at] ?? 0) * SECONDS_PER_HOUR;
    const pumpKw = running === AIR ? 0 : pumpKwPerKw * load;
    const backUpKw = load * (1 - carried);
    const rests = economy && hours.airMeets[at] === 1;
    hours.evaporatedLitres[at] = evaporated;
    hours.makeUpLitres[at] = evaporated + evaporated / (cycles - 1);
    hours.coolingKwh[at] = load * carried;
    hours.kwh[at] = (fanWPerLs[running] ?? 0) * airflowM3PerS + pumpKw + backUpKw / cop;
    hours.referenceKwh[at] = referenceFanWPerLs * airflowM3PerS + (rests ? 0 : load / cop);
    hours.backUpKw[at] = backUpKw;
  }
}
