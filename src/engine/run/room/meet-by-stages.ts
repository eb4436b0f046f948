import { hundredths } from '../../conventions.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import { enterMedium } from './enter-medium.ts';
import { capsHoldOnWarmSupply, ROUNDING_K } from './room-caps.ts';
import { room } from './room-hours.ts';
import { CLASS_OF_STAGE, isMoist, type RoomPlan } from './room-plan.ts';
import { dewPointFallK, indirectFallK, lineBottom, lineTop, ratioOnLine, shareFor } from './supply-lines.ts';
import type { WetBulbs } from './wet-bulbs-of-year.ts';

const INDIRECT = runningStages.indexOf('indirect');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Constants of this module: see `hour-block.ts`. */
const { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, supplyAimC, supplyC, supplyRatio } = block;
const { classCode, aloneMet, running, share: shares, evaporatedKgPerKg, waterC } = block;
const { ratioUnderCaps, wetBulbC, entersC, mediumWetC } = room;
const { places } = room.wet;
const { places: unmetPlaces } = room.unmet;

/**
 * Hours in which a stage reaches t_sup within the caps, with the x that just does (on-off: x = 1). The first that does in the brief's
 * order runs; the others are only marked as able to. Hours that no stage meets are added to the unmet ones.
 *
 * One loop for each stage: what the stage is need not be asked at every hour, and few numbers are at work at a time.
 */
export function meetByStages(plan: RoomPlan, wetBulbs: WetBulbs): void {
  for (let nth = 0; nth < plan.stages.length; nth++) {
    const stage = plan.stages[nth] ?? 0;
    if (isMoist(stage)) {
      enterMedium(plan, stage, room.wet, wetBulbs);
      meetMoist(plan, stage);
    } else meetDry(plan, stage);
  }
  listUnmet();
}

/** A stage that adds no moisture. */
function meetDry(plan: RoomPlan, stage: number): void {
  const { count } = room.wet;
  const { onOff, effIndirect, effDewPoint, k } = plan;
  const risePerVolume = plan.riseKPerVolume[stage] ?? 0;
  const classOfStage = CLASS_OF_STAGE[stage] ?? 0;
  let edgeOfAimC = Number.NaN;
  let aimEdge = Number.NaN;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const tempC = dryBulbC[at] ?? 0;
    const ratio = humidityRatio[at] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    if (aimC !== edgeOfAimC) {
      edgeOfAimC = aimC;
      aimEdge = hundredths(aimC) + 0.5;
    }
    const fallK =
      stage === INDIRECT
        ? indirectFallK(effIndirect, tempC, wetBulbC[at] ?? 0)
        : dewPointFallK(effDewPoint, tempC, ratio, pressurePa[at] ?? 0);
    const dryC = tempC + risePerVolume * (volumeM3PerKg[at] ?? 0);
    if (!(100 * (dryC - fallK) < aimEdge)) continue;
    const share = onOff ? 1 : shareFor(dryC, fallK, aimC);
    const suppliedC = dryC - share * fallK;
    const holds =
      suppliedC <= aimC + ROUNDING_K
        ? ratio < (ratioUnderCaps[at] ?? 0)
        : capsHoldOnWarmSupply(plan, at, suppliedC, ratio);
    if (!holds) continue;
    const before = aloneMet[at] ?? 0;
    aloneMet[at] = before | (1 << stage);
    if (before !== 0) continue;
    classCode[at] = classOfStage;
    running[at] = stage;
    supplyC[at] = suppliedC;
    shares[at] = share;
    evaporatedKgPerKg[at] = secondaryWaterKgPerKg(share * fallK, k);
    waterC[at] = wetBulbC[at] ?? 0;
  }
}

/** A stage that wets the supply: `entersC` and `mediumWetC` of `room` are its own. */
function meetMoist(plan: RoomPlan, stage: number): void {
  const { count } = room.wet;
  const { onOff, effDirect, effIndirect, k } = plan;
  const risePerVolume = plan.riseKPerVolume[stage] ?? 0;
  const classOfStage = CLASS_OF_STAGE[stage] ?? 0;
  let edgeOfAimC = Number.NaN;
  let aimEdge = Number.NaN;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const mediumC = entersC[at] ?? 0;
    const wetC = mediumWetC[at] ?? 0;
    const outdoorRatio = humidityRatio[at] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    if (aimC !== edgeOfAimC) {
      edgeOfAimC = aimC;
      aimEdge = hundredths(aimC) + 0.5;
    }
    const riseK = risePerVolume * (volumeM3PerKg[at] ?? 0);
    const fallK = effDirect * (mediumC - wetC);
    const dryC = mediumC + riseK;
    if (!(100 * (dryC - fallK) < aimEdge)) continue;
    const share = onOff ? 1 : shareFor(dryC, fallK, aimC);
    const suppliedC = dryC - share * fallK;
    let ratio = outdoorRatio;
    if (share > 0) {
      const top = lineTop(outdoorRatio, mediumC, wetC);
      ratio = Math.max(outdoorRatio, ratioOnLine(top, lineBottom(wetC), suppliedC - riseK));
    }
    const holds =
      suppliedC <= aimC + ROUNDING_K
        ? ratio < (ratioUnderCaps[at] ?? 0)
        : capsHoldOnWarmSupply(plan, at, suppliedC, ratio);
    if (!holds) continue;
    const before = aloneMet[at] ?? 0;
    aloneMet[at] = before | (1 << stage);
    if (before !== 0) continue;
    classCode[at] = classOfStage;
    running[at] = stage;
    supplyC[at] = suppliedC;
    shares[at] = share;
    supplyRatio[at] = ratio;
    const outdoorWetC = wetBulbC[at] ?? 0;
    // Before a wetted medium an indirect stage runs at full effect.
    const firstFallK = stage === TWO_STAGE ? indirectFallK(effIndirect, dryBulbC[at] ?? 0, outdoorWetC) : 0;
    evaporatedKgPerKg[at] = secondaryWaterKgPerKg(firstFallK, k) + (ratio - outdoorRatio);
    waterC[at] = stage === TWO_STAGE ? Math.max(outdoorWetC, wetC) : outdoorWetC;
  }
}

function listUnmet(): void {
  const { count } = room.wet;
  let unmetCount = room.unmet.count;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    if (aloneMet[at] === 0) unmetPlaces[unmetCount++] = at;
  }
  room.unmet.count = unmetCount;
}
