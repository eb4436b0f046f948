import { hundredths } from '../../conventions.ts';
import { withinShare } from '../../hour-classes/demand-hour.ts';
import { hourClasses } from '../../hour-classes/hour-class.ts';
import { gainsEnough } from '../../hour-classes/short-from.ts';
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledDewPointC } from '../../psychrometrics/saturation-table.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { block } from '../hour-block.ts';
import { dampReasons, runningStages } from '../hour-columns.ts';
import { moistEdgeC } from './moist-edge.ts';
import {
  capsHoldOnWarmSupply,
  clearlyOverRoomCap,
  dryEdgeOfSupplyC,
  ROUNDING_K,
  roomVapourPa,
  supplyCapsHold,
} from './room-caps.ts';
import { room } from './room-hours.ts';
import type { RoomPlan } from './room-plan.ts';
import { dewPointFallK, indirectFallK, lineBottom, lineTop, ratioOnLine, shareFor } from './supply-lines.ts';
import { findSecondWetBulb, type WetBulbs } from './wet-bulbs-of-year.ts';

const FROZEN = hourClasses.indexOf('frozen');
const DAMP = hourClasses.indexOf('damp');
const SHORT = hourClasses.indexOf('short');
const BEYOND = hourClasses.indexOf('beyond');
const OUTSIDE = dampReasons.indexOf('outside');
const PLANT = dampReasons.indexOf('plant');
const DIRECT = runningStages.indexOf('direct');
const INDIRECT = runningStages.indexOf('indirect');
const TWO_STAGE = runningStages.indexOf('twostage');
/** Stands for outdoor air among the stages, before all of them. */
const NO_STAGE = -1;

/** Constants of this module: see `hour-block.ts`. */
const { slot, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, setC, supplyAimC, airSupplyC } = block;
const { classCode, met, damp, shortfallK, uncappedShortfallK, carriedShare } = block;
const { running, supplyC, supplyRatio, share: shares, evaporatedKgPerKg, waterC } = block;
const { mayWet, wetBulbC, ratioUnderCaps } = room;
const { top: tops, bottom: bottoms, fanRiseK: fanRises, dryC: dries, fullC: fulls } = room;
const { places } = room.unmet;

/**
 * `damp`, `short` or `beyond` (or `frozen`) of every hour that is listed as unmet, with the shortfall from T* of method 3.1: the lowest
 * supply, over air and every permitted stage, at which the caps hold. More wetting is never drier and never warmer, so the shares
 * within the caps end at one place, the edge. Of equal supplies the first in the brief's order gives T*.
 *
 * Stages that add no moisture go first: where one of them reaches the temperature at which outdoor moisture alone is at the cap, no
 * other can be colder. Two-stage goes before direct: where it ends, its air holds less moisture than that of direct would.
 */
export function judgeUnmet(plan: RoomPlan, wetBulbs: WetBulbs): void {
  const { count } = room.unmet;
  const secondBulbs = wetBulbs.secondWetBulbC;
  const { riseKPerVolume, onOff, effDirect, effIndirect, roomShare, dwRoomKgKg, capsSupply, dryFirst, dryStages } =
    plan;
  const freezeEdge = plan.freezeHundredths + 0.5;
  let edgeOfAimC = Number.NaN;
  let aimEdge = Number.NaN;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const tempC = dryBulbC[at] ?? 0;
    const ratio = humidityRatio[at] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    const roomC = setC[at] ?? 0;
    const airC = airSupplyC[at] ?? 0;
    const pressure = pressurePa[at] ?? 0;
    if (aimC !== edgeOfAimC) {
      edgeOfAimC = aimC;
      aimEdge = hundredths(aimC) + 0.5;
    }
    const ofRoomPa = vapourPressurePa(ratio + dwRoomKgKg, pressure);
    const holds =
      airC <= aimC + ROUNDING_K
        ? ratio < (ratioUnderCaps[at] ?? 0)
        : ofRoomPa < roomVapourPa(plan, airC + (roomC - aimC)) &&
          (!capsSupply || supplyCapsHold(plan, at, airC, ratio));
    let lowestC = holds ? airC : Number.POSITIVE_INFINITY;
    let lowestNth = NO_STAGE;
    let lowestShare = 0;
    let uncappedC = airC;
    if (mayWet[at] === 1) {
      const volume = volumeM3PerKg[at] ?? 0;
      const wetC = wetBulbC[at] ?? 0;
      const firstFallK = indirectFallK(effIndirect, tempC, wetC);
      // The supply at which the caps are just reached with the moisture of outdoor air.
      let dryEdgeC = Number.NEGATIVE_INFINITY;
      if (!onOff) {
        if (roomShare !== Number.POSITIVE_INFINITY) {
          dryEdgeC = tabledDewPointC(ofRoomPa / roomShare) - (roomC - aimC);
        }
        if (capsSupply) dryEdgeC = dryEdgeOfSupplyC(plan, at, dryEdgeC);
      }
      for (let turn = 0; turn < dryFirst.length; turn++) {
        const nth = dryFirst[turn] ?? 0;
        const stage = plan.stages[nth] ?? 0;
        const riseK = (riseKPerVolume[stage] ?? 0) * volume;
        let mediumC = tempC;
        let mediumWetC = wetC;
        let fallK = firstFallK;
        if (stage === TWO_STAGE) {
          mediumC = tempC - firstFallK;
          mediumWetC = secondBulbs[slot[at] ?? 0] ?? Number.NaN;
          if (Number.isNaN(mediumWetC))
            mediumWetC = findSecondWetBulb(wetBulbs, slot[at] ?? 0, mediumC, ratio, pressure);
        }
        const moist = turn >= dryStages;
        if (moist) fallK = effDirect * (mediumC - mediumWetC);
        else if (stage !== INDIRECT) fallK = dewPointFallK(plan.effDewPoint, tempC, ratio, pressurePa[at] ?? 0);
        const dryC = mediumC + riseK;
        const fullC = dryC - fallK;
        uncappedC = Math.min(uncappedC, fullC);
        if (!(fullC < lowestC || (fullC === lowestC && nth < lowestNth))) continue;
        let edgeC = dryEdgeC;
        if (moist) {
          // Not even the moisture of outdoor air would allow a lower supply.
          if (dryEdgeC >= lowestC - ROUNDING_K) continue;
          const top = lineTop(ratio, mediumC, mediumWetC);
          const bottom = lineBottom(mediumWetC);
          if (onOff) {
            const fullRatio = Math.max(ratio, ratioOnLine(top, bottom, fullC - riseK));
            if (!capsHoldAt(plan, at, fullC, fullRatio)) continue;
          } else {
            // Nor does the moisture that this stage has added there.
            if (lowestC < dryC && clearlyOverRoomCap(plan, at, lowestC, ratioOnLine(top, bottom, lowestC - riseK)))
              continue;
            tops[at] = top;
            bottoms[at] = bottom;
            fanRises[at] = riseK;
            dries[at] = dryC;
            fulls[at] = fullC;
            edgeC = moistEdgeC(plan, at);
          }
        } else if (onOff && !capsHoldAt(plan, at, fullC, ratio)) continue;
        if (!(edgeC <= dryC)) continue;
        const share = onOff ? 1 : shareFor(dryC, fallK, edgeC);
        const suppliedC = dryC - share * fallK;
        if (!(suppliedC < lowestC || (suppliedC === lowestC && nth < lowestNth))) continue;
        lowestC = suppliedC;
        lowestNth = nth;
        lowestShare = share;
      }
    }
    const frozen = 100 * tempC < freezeEdge;
    const dampOutside = damp[at] === OUTSIDE;
    const enough = mayWet[at] === 1 && 100 * uncappedC < aimEdge;
    const isDamp = !frozen && (dampOutside || enough);
    const short = !frozen && !isDamp && lowestNth >= 0 && gainsEnough(airC, lowestC);
    classCode[at] = frozen ? FROZEN : isDamp ? DAMP : short ? SHORT : BEYOND;
    met[at] = 0;
    if (isDamp && !dampOutside) damp[at] = PLANT;
    shortfallK[at] = Math.max(0, (lowestC === Number.POSITIVE_INFINITY ? airC : lowestC) - aimC);
    uncappedShortfallK[at] = Math.max(0, uncappedC - aimC);
    if (short) runLowest(plan, wetBulbs, at, plan.stages[lowestNth] ?? 0, lowestC, lowestShare);
    carriedShare[at] = isDamp ? 0 : withinShare((roomC - (supplyC[at] ?? 0)) / (roomC - aimC));
  }
}

function capsHoldAt(plan: RoomPlan, at: number, supplyC: number, ratio: number): boolean {
  if (supplyC <= (supplyAimC[at] ?? 0) + ROUNDING_K) return ratio < (ratioUnderCaps[at] ?? 0);
  return capsHoldOnWarmSupply(plan, at, supplyC, ratio);
}

/** In `short` the stage and share that give T* run. */
function runLowest(
  plan: RoomPlan,
  wetBulbs: WetBulbs,
  at: number,
  stage: number,
  lowestC: number,
  share: number,
): void {
  const tempC = dryBulbC[at] ?? 0;
  const outdoorRatio = humidityRatio[at] ?? 0;
  const wetC = wetBulbC[at] ?? 0;
  const firstFallK = indirectFallK(plan.effIndirect, tempC, wetC);
  running[at] = stage;
  supplyC[at] = lowestC;
  shares[at] = share;
  waterC[at] = wetC;
  if (stage !== DIRECT && stage !== TWO_STAGE) {
    const fallK =
      stage === INDIRECT ? firstFallK : dewPointFallK(plan.effDewPoint, tempC, outdoorRatio, pressurePa[at] ?? 0);
    evaporatedKgPerKg[at] = secondaryWaterKgPerKg(share * fallK, plan.k);
    return;
  }
  const twoStage = stage === TWO_STAGE;
  const mediumC = twoStage ? tempC - firstFallK : tempC;
  const mediumWetC = twoStage ? (wetBulbs.secondWetBulbC[slot[at] ?? 0] ?? 0) : wetC;
  const riseK = (plan.riseKPerVolume[stage] ?? 0) * (volumeM3PerKg[at] ?? 0);
  const onLine = ratioOnLine(lineTop(outdoorRatio, mediumC, mediumWetC), lineBottom(mediumWetC), lowestC - riseK);
  const ratio = share > 0 ? Math.max(outdoorRatio, onLine) : outdoorRatio;
  const gained = ratio - outdoorRatio;
  supplyRatio[at] = ratio;
  evaporatedKgPerKg[at] = twoStage ? secondaryWaterKgPerKg(firstFallK, plan.k) + gained : gained;
  if (twoStage) waterC[at] = Math.max(wetC, mediumWetC);
}
