import { dewPointC, saturationHumidityRatio } from '../../psychrometrics/moist-air.ts';
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { ratioOnWetBulbLine } from '../../psychrometrics/wet-bulb-line.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { fanRiseK } from '../../stages/stage-path.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import type { IndexPlan } from './index-plan.ts';
import { assess, indexStates, reachesLimit } from './index-states.ts';

const DIRECT = runningStages.indexOf('direct');
const DEW_POINT = runningStages.indexOf('dewpoint');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Constants of this module: see `hour-block.ts`. */
const { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg } = block;
const { stage: stages, share: shares, tempC: temps, humidityRatio: ratios, withinCaps } = indexStates;
const { evaporatedKgPerKg: evaporated, waterC: waters } = indexStates;

/**
 * Writes the states of a stage (method 4, as `src/engine/stages`) in the hour `at`, from a place on: from dry to full wetting, up to
 * the first good one. Of the stages that wet the supply, the humidity of saturation at the wet bulb is the same at every share.
 * @param input.wetC wet bulb of outdoor air, °C
 * @returns the place behind the last one
 */
export function tryStage(
  plan: IndexPlan,
  at: number,
  { stage, wetC, from }: { stage: number; wetC: number; from: number },
): number {
  const tempC = dryBulbC[at] ?? 0;
  const outdoorRatio = humidityRatio[at] ?? 0;
  const pressure = pressurePa[at] ?? 0;
  const riseK = fanRiseK(plan.fanWPerLs[stage] ?? 0, volumeM3PerKg[at] ?? 0);
  const moist = stage === DIRECT || stage === TWO_STAGE;
  const firstFallK = Math.max(0, plan.effIndirect * (tempC - wetC));
  // Air that enters the last part of the stage, the wet bulb to which that may cool it, and how far it does.
  const entersC = stage === TWO_STAGE ? tempC - firstFallK : tempC;
  const mediumWetC = stage === TWO_STAGE ? wetBulbC(entersC, outdoorRatio, pressure) : wetC;
  const saturated = moist ? saturationHumidityRatio(mediumWetC, pressure) : 0;
  const fallK = moist
    ? plan.effDirect * (entersC - mediumWetC)
    : stage === DEW_POINT
      ? plan.effDewPoint * (tempC - dewPointC(tempC, outdoorRatio, pressure))
      : firstFallK;
  const firstWater = stage === TWO_STAGE ? secondaryWaterKgPerKg(firstFallK, plan.k) : 0;
  let place = from;
  for (let nth = 0; nth < plan.shares.length; nth++) {
    const share = plan.shares[nth] ?? 0;
    const leavingC = entersC - share * fallK;
    const ratio =
      moist && share > 0 ? Math.max(outdoorRatio, ratioOnWetBulbLine(saturated, leavingC, mediumWetC)) : outdoorRatio;
    stages[place] = stage;
    shares[place] = share;
    temps[place] = leavingC + riseK;
    ratios[place] = ratio;
    evaporated[place] = moist ? firstWater + (ratio - outdoorRatio) : secondaryWaterKgPerKg(share * fallK, plan.k);
    waters[place] = stage === TWO_STAGE ? Math.max(wetC, mediumWetC) : wetC;
    assess(plan, at, place);
    place++;
    if (withinCaps[place - 1] === 1 && reachesLimit(plan, at, place - 1)) break;
  }
  return place;
}
