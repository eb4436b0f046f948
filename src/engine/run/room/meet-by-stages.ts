import { hundredths } from '../../conventions.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import { enterMediumWhenWet } from './enter-medium.ts';
import { capsHoldOnWarmSupply, ROUNDING_K } from './room-caps.ts';
import { room } from './room-hours.ts';
import { CLASS_OF_STAGE, isMoist, type RoomPlan } from './room-plan.ts';
import { type RoomLoop, runLoop } from './run-loop.ts';
import { dewPointFallK, indirectFallK, lineBottom, lineTop, ratioOnLine, shareFor } from './supply-lines.ts';
import type { WetBulbs } from './wet-bulbs-of-year.ts';

const INDIRECT = runningStages.indexOf('indirect');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Constants of this module: see `hour-block.ts`. */
const { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, supplyAimC, supplyC, supplyRatio } = block;
const { classCode, aloneMet, running, share: shares, evaporatedKgPerKg, waterC } = block;
const { ratioUnderCaps, wetBulbC, entersC, mediumWetC, triedC, triedRatio, triedShare, triedDryFallK } = room;
const { places } = room.wet;
const { places: meeting } = room.meeting;
const { places: warm } = room.warm;
const { places: unmetPlaces } = room.unmet;

/**
 * Hours in which a stage reaches t_sup within the caps, with the x that just does (on-off: x = 1). The first that does in the brief's
 * order runs; the others are only marked as able to. Hours that no stage meets are added to the unmet ones.
 *
 * One loop for each stage: what the stage is need not be asked at every hour, and few numbers are at work at a time. Supplies that end
 * warmer than they need be are rare and have a loop of their own, since a loop that may call runs at half the speed.
 */
export function meetByStages(plan: RoomPlan, wetBulbs: WetBulbs): void {
  for (let nth = 0; nth < plan.stages.length; nth++) {
    const loops = isMoist(plan.stages[nth] ?? 0) ? loopsOfMoist : loopsOfDry;
    for (let at = 0; at < loops.length; at++) runLoop(loops[at] ?? addWarm, plan, wetBulbs, nth);
  }
  listUnmet();
}

const loopsOfDry: readonly RoomLoop[] = [tryDry, addWarm, meet];
const loopsOfMoist: readonly RoomLoop[] = [enterMediumWhenWet, tryMoist, addWarm, meet];

/** A stage that adds no moisture. */
function tryDry(plan: RoomPlan, _wetBulbs: WetBulbs, _nth: number, stage: number): void {
  const { count } = room.wet;
  const { onOff, effIndirect, effDewPoint } = plan;
  const risePerVolume = plan.riseKPerVolume[stage] ?? 0;
  let edgeOfAimC = Number.NaN;
  let aimEdge = Number.NaN;
  let meetingCount = 0;
  let warmCount = 0;
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
    triedC[at] = suppliedC;
    triedRatio[at] = ratio;
    triedShare[at] = share;
    triedDryFallK[at] = share * fallK;
    if (!(suppliedC <= aimC + ROUNDING_K)) warm[warmCount++] = at;
    else if (ratio < (ratioUnderCaps[at] ?? 0)) meeting[meetingCount++] = at;
  }
  room.meeting.count = meetingCount;
  room.warm.count = warmCount;
}

/** A stage that wets the supply: `entersC` and `mediumWetC` of `room` are its own. */
function tryMoist(plan: RoomPlan, _wetBulbs: WetBulbs, _nth: number, stage: number): void {
  const { count } = room.wet;
  const { onOff, effDirect, effIndirect } = plan;
  const risePerVolume = plan.riseKPerVolume[stage] ?? 0;
  let edgeOfAimC = Number.NaN;
  let aimEdge = Number.NaN;
  let meetingCount = 0;
  let warmCount = 0;
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
    triedC[at] = suppliedC;
    triedRatio[at] = ratio;
    triedShare[at] = share;
    // Before a wetted medium an indirect stage runs at full effect.
    triedDryFallK[at] = stage === TWO_STAGE ? indirectFallK(effIndirect, dryBulbC[at] ?? 0, wetBulbC[at] ?? 0) : 0;
    if (!(suppliedC <= aimC + ROUNDING_K)) warm[warmCount++] = at;
    else if (ratio < (ratioUnderCaps[at] ?? 0)) meeting[meetingCount++] = at;
  }
  room.meeting.count = meetingCount;
  room.warm.count = warmCount;
}

function addWarm(plan: RoomPlan): void {
  for (let index = 0; index < room.warm.count; index++) {
    const at = warm[index] ?? 0;
    if (capsHoldOnWarmSupply(plan, at, triedC[at] ?? 0, triedRatio[at] ?? 0)) meeting[room.meeting.count++] = at;
  }
}

/** The stage could meet these hours; it does where no other before it has. */
function meet({ k }: RoomPlan, _wetBulbs: WetBulbs, _nth: number, stage: number): void {
  const { count } = room.meeting;
  const classOfStage = CLASS_OF_STAGE[stage] ?? 0;
  for (let index = 0; index < count; index++) {
    const at = meeting[index] ?? 0;
    const before = aloneMet[at] ?? 0;
    aloneMet[at] = before | (1 << stage);
    if (before !== 0) continue;
    const outdoorWetC = wetBulbC[at] ?? 0;
    classCode[at] = classOfStage;
    running[at] = stage;
    supplyC[at] = triedC[at] ?? 0;
    shares[at] = triedShare[at] ?? 0;
    supplyRatio[at] = triedRatio[at] ?? 0;
    evaporatedKgPerKg[at] =
      secondaryWaterKgPerKg(triedDryFallK[at] ?? 0, k) + ((triedRatio[at] ?? 0) - (humidityRatio[at] ?? 0));
    waterC[at] = stage === TWO_STAGE ? Math.max(outdoorWetC, mediumWetC[at] ?? 0) : outdoorWetC;
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
