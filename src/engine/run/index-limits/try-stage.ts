import { dewPointC, saturationHumidityRatio } from '../../psychrometrics/moist-air.ts';
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { ICE, WATER } from '../../psychrometrics/wet-surface.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { fanRiseK } from '../../stages/stage-path.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import { findSaturated, type Wetting } from '../other-uses/wetting-of-year.ts';
import type { IndexPlan } from './index-plan.ts';
import { assess, indexStates, reachesLimit } from './index-states.ts';

const water = WATER;
const ice = ICE;
const AIR_KJ_PER_KG_K = 1.006;
const VAPOUR_KJ_PER_KG_K = 1.86;
const AIR = runningStages.indexOf('air');
const DIRECT = runningStages.indexOf('direct');
const DEW_POINT = runningStages.indexOf('dewpoint');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Stages that were tried in the hour, by their place in the brief's order. */
const MOST_STAGES = runningStages.length;
const numbers = () => new Float64Array(MOST_STAGES);
const made = {
  /** The place of a stage's first state, the others behind it in ascending shares. */
  from: new Uint8Array(MOST_STAGES),
  /** How far it cools at full wetting, K; water of an indirect part before a wetted medium, kg/kg; and what wet bulb that air has, °C. */
  fallK: numbers(),
  firstWater: numbers(),
  mediumWetC: numbers(),
};

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, supplyC, supplyRatio } = block;
const { running, share: sharesRun, evaporatedKgPerKg, waterC } = block;
const { tempC: temps, humidityRatio: ratios, withinCaps } = indexStates;
const { from: firsts, fallK: falls, firstWater: firstWaters, mediumWetC: mediumWets } = made;

/**
 * Writes the states of a stage (method 4, as `src/engine/stages`) in the hour `at`, from a place on: from dry to full wetting, up to
 * the first good one. Of the stages that wet the supply, the humidity of saturation at the wet bulb is the same at every share.
 * @param input.nth place of the stage in the brief's order
 * @param input.wetC wet bulb of outdoor air, °C
 * @returns the place behind the last one
 */
export function tryStage(
  plan: IndexPlan,
  at: number,
  { nth: nthStage, wetC, from, wetting }: { nth: number; wetC: number; from: number; wetting: Wetting },
): number {
  const stage = plan.stages[nthStage] ?? 0;
  const tempC = dryBulbC[at] ?? 0;
  const outdoorRatio = humidityRatio[at] ?? 0;
  const pressure = pressurePa[at] ?? 0;
  const riseK = fanRiseK(plan.fanWPerLs[stage] ?? 0, volumeM3PerKg[at] ?? 0);
  const moist = stage === DIRECT || stage === TWO_STAGE;
  const firstFallK = Math.max(0, plan.effIndirect * (tempC - wetC));
  // Air that enters the last part of the stage, the wet bulb to which that may cool it, and how far it does.
  const entersC = stage === TWO_STAGE ? tempC - firstFallK : tempC;
  const mediumWetC = stage === TWO_STAGE ? wetBulbC(entersC, outdoorRatio, pressure) : wetC;
  const saturated =
    stage === DIRECT ? saturatedAt(wetting, at) : moist ? saturationHumidityRatio(mediumWetC, pressure) : 0;
  const fallK = moist
    ? plan.effDirect * (entersC - mediumWetC)
    : stage === DEW_POINT
      ? plan.effDewPoint * (tempC - dewPointC(tempC, outdoorRatio, pressure))
      : firstFallK;
  firsts[nthStage] = from;
  falls[nthStage] = fallK;
  firstWaters[nthStage] = stage === TWO_STAGE ? secondaryWaterKgPerKg(firstFallK, plan.k) : 0;
  mediumWets[nthStage] = mediumWetC;
  // `ratioOnWetBulbLine` with what is the same at every share worked out before.
  const surface = mediumWetC >= 0 ? water : ice;
  const latent = surface.latentKJPerKg;
  const lineHeat = (latent + surface.latentSlopeKJPerKgK * mediumWetC) * saturated;
  const surfaceHeat = surface.surfaceKJPerKgK * mediumWetC;
  let place = from;
  for (let nth = 0; nth < plan.shares.length; nth++) {
    const share = plan.shares[nth] ?? 0;
    const leavingC = entersC - share * fallK;
    temps[place] = leavingC + riseK;
    ratios[place] =
      moist && share > 0
        ? Math.max(
            outdoorRatio,
            (lineHeat - AIR_KJ_PER_KG_K * (leavingC - mediumWetC)) /
              (latent + VAPOUR_KJ_PER_KG_K * leavingC - surfaceHeat),
          )
        : outdoorRatio;
    assess(plan, at, place);
    place++;
    if (withinCaps[place - 1] === 1 && reachesLimit(plan, at, place - 1)) break;
  }
  return place;
}

/** Of outdoor air at its wet bulb, which is there, kg/kg. */
function saturatedAt(wetting: Wetting, at: number): number {
  const from = slot[at] ?? 0;
  const { saturatedRatio } = wetting;
  if (Number.isNaN(saturatedRatio[from] ?? 0)) findSaturated(wetting, from, pressurePa[at] ?? 0);
  return saturatedRatio[from] ?? 0;
}

/** The state at a place is what is supplied in the hour `at`; the first place is outdoor air's. */
export function runState(plan: IndexPlan, at: number, place: number, wetC: number): void {
  supplyC[at] = temps[place] ?? 0;
  supplyRatio[at] = ratios[place] ?? 0;
  if (place === 0) {
    running[at] = AIR;
    return;
  }
  let nthStage = plan.stages.length - 1;
  while (nthStage > 0 && place < (firsts[nthStage] ?? 0)) nthStage--;
  const stage = plan.stages[nthStage] ?? 0;
  const share = plan.shares[place - (firsts[nthStage] ?? 0)] ?? 0;
  const moist = stage === DIRECT || stage === TWO_STAGE;
  running[at] = stage;
  sharesRun[at] = share;
  evaporatedKgPerKg[at] = moist
    ? (firstWaters[nthStage] ?? 0) + ((ratios[place] ?? 0) - (humidityRatio[at] ?? 0))
    : secondaryWaterKgPerKg(share * (falls[nthStage] ?? 0), plan.k);
  waterC[at] = stage === TWO_STAGE ? Math.max(wetC, mediumWets[nthStage] ?? 0) : wetC;
}
