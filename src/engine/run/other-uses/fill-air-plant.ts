import type { Brief } from '../../brief/brief.ts';
import { DRY_AIR_KJ_PER_KG_K } from '../../stages/stage-path.ts';
import { SECONDS_PER_HOUR } from '../../water-energy/plant-hour.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';

const AIR = runningStages.indexOf('air');

/** A constant stream of air that carries the load. */
export interface AirStream {
  /** Rise over which it carries the design load, K. */
  readonly riseK: number;
  /** W per L/s by what runs, by position in `runningStages`; and of the reference. */
  readonly fanWPerLs: Float64Array;
  readonly referenceFanWPerLs: number;
}

/** Constants of this module: see `hour-block.ts`. */
const { volumeM3PerKg, loadFraction, carriedShare, running, airMeets, evaporatedKgPerKg } = block;
const { evaporatedLitres, makeUpLitres, coolingKwh, kwh, referenceKwh, backUpKw } = block;

/** Method 6 for the hours of `block`, served by a stream of air: `air-plant-hour.ts` in columns, figure by figure; a test holds them together. */
export function fillAirPlant(brief: Brief, stream: AirStream): void {
  const { count } = block;
  const airflowKgPerS = 1 / (DRY_AIR_KJ_PER_KG_K * stream.riseK);
  const { pumpKwPerKw, cycles } = brief;
  const { cop, economy } = brief.reference;
  const { fanWPerLs, referenceFanWPerLs } = stream;
  for (let at = 0; at < count; at++) {
    const load = loadFraction[at] ?? 0;
    const carried = carriedShare[at] ?? 0;
    const stage = running[at] ?? 0;
    const airflowM3PerS = airflowKgPerS * (volumeM3PerKg[at] ?? 0);
    const evaporated = airflowKgPerS * (evaporatedKgPerKg[at] ?? 0) * SECONDS_PER_HOUR;
    const pumpKw = stage === AIR ? 0 : pumpKwPerKw * load;
    const leftKw = load * (1 - carried);
    const rests = economy && airMeets[at] === 1;
    evaporatedLitres[at] = evaporated;
    makeUpLitres[at] = evaporated + evaporated / (cycles - 1);
    coolingKwh[at] = load * carried;
    kwh[at] = (fanWPerLs[stage] ?? 0) * airflowM3PerS + pumpKw + leftKw / cop;
    referenceKwh[at] = referenceFanWPerLs * airflowM3PerS + (rests ? 0 : load / cop);
    backUpKw[at] = leftKw;
  }
}
