/**
 * T* of method 3.1 for every hour that is listed as unmet: the lowest supply, over air and every permitted stage, at which the caps
 * hold. More wetting is never drier and never warmer, so the shares within the caps end at one place, the edge. Of equal supplies the
 * first in the brief's order gives T*.
 *
 * Stages that add no moisture go first: where one of them reaches the temperature at which outdoor moisture alone is at the cap, no
 * other can be colder. Two-stage goes before direct: where it ends, its air holds less moisture than that of direct would.
 *
 * One loop for each stage, as in `meetByStages`; a number that went through a call would be put into an object for it.
 */
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledDewPointC } from '../../psychrometrics/saturation-table.ts';
import { block } from '../hour-block.ts';
import { runningStages } from '../hour-columns.ts';
import { enterMediumWhenUnmet } from './enter-medium.ts';
import { findMoistEdges } from './moist-edge.ts';
import {
  capsHoldOnWarmSupply,
  clearlyOverRoomCap,
  dryEdgeOfSupplyC,
  ROUNDING_K,
  roomVapourPa,
  supplyCapsHold,
} from './room-caps.ts';
import { room } from './room-hours.ts';
import { isMoist, type RoomPlan } from './room-plan.ts';
import { runLoop } from './run-loop.ts';
import { dewPointFallK, indirectFallK, lineBottom, lineTop, ratioOnLine, shareFor } from './supply-lines.ts';
import type { WetBulbs } from './wet-bulbs-of-year.ts';

const INDIRECT = runningStages.indexOf('indirect');
/** Stands for outdoor air among the stages, before all of them. */
const NO_STAGE = -1;

/** Constants of this module: see `hour-block.ts`. */
const { dryBulbC, humidityRatio, pressurePa, volumeM3PerKg, setC, supplyAimC, airSupplyC } = block;
const { mayWet, wetBulbC, ratioUnderCaps, entersC, mediumWetC, uncappedC, dryEdgeC } = room;
const { lowestC: lowests, lowestNth: lowestNths, lowestShare: lowestShares } = room;
const { top: tops, bottom: bottoms, fanRiseK: fanRises, dryC: dries, fullC: fulls, edgeC: edges } = room;
const { places: unmetPlaces } = room.unmet;
const { places: wettable } = room.wettable;
const { places: lines } = room.lines;

export function findLowestSupplies(plan: RoomPlan, wetBulbs: WetBulbs): void {
  runLoop(beginWithAir, plan, wetBulbs, 0);
  if (!plan.onOff) runLoop(findDryEdges, plan, wetBulbs, 0);
  for (let turn = 0; turn < plan.dryFirst.length; turn++) {
    const nth = plan.dryFirst[turn] ?? 0;
    if (!isMoist(plan.stages[nth] ?? 0)) runLoop(tryDry, plan, wetBulbs, nth);
    else {
      runLoop(enterMediumWhenUnmet, plan, wetBulbs, nth);
      runLoop(listLines, plan, wetBulbs, nth);
      if (!plan.onOff) findMoistEdges(plan);
      runLoop(tryMoist, plan, wetBulbs, nth);
    }
  }
}

function beginWithAir(plan: RoomPlan): void {
  const { count } = room.unmet;
  const { dwRoomKgKg, capsSupply } = plan;
  let wettableCount = 0;
  for (let index = 0; index < count; index++) {
    const at = unmetPlaces[index] ?? 0;
    const ratio = humidityRatio[at] ?? 0;
    const aimC = supplyAimC[at] ?? 0;
    const airC = airSupplyC[at] ?? 0;
    const riseK = (setC[at] ?? 0) - aimC;
    const holds =
      airC <= aimC + ROUNDING_K
        ? ratio < (ratioUnderCaps[at] ?? 0)
        : vapourPressurePa(ratio + dwRoomKgKg, pressurePa[at] ?? 0) < roomVapourPa(plan, airC + riseK) &&
          (!capsSupply || supplyCapsHold(plan, at, airC, ratio));
    lowests[at] = holds ? airC : Number.POSITIVE_INFINITY;
    lowestNths[at] = NO_STAGE;
    lowestShares[at] = 0;
    uncappedC[at] = airC;
    dryEdgeC[at] = Number.NEGATIVE_INFINITY;
    wettable[wettableCount] = at;
    wettableCount += mayWet[at] ?? 0;
  }
  room.wettable.count = wettableCount;
}

/** The supplies at which the caps are just reached with the moisture of outdoor air. */
function findDryEdges(plan: RoomPlan): void {
  const { count } = room.wettable;
  const { roomShare, dwRoomKgKg, capsSupply } = plan;
  for (let index = 0; index < count; index++) {
    const at = wettable[index] ?? 0;
    let edgeC = Number.NEGATIVE_INFINITY;
    if (roomShare !== Number.POSITIVE_INFINITY) {
      const vapourPa = vapourPressurePa((humidityRatio[at] ?? 0) + dwRoomKgKg, pressurePa[at] ?? 0);
      edgeC = tabledDewPointC(vapourPa / roomShare) - ((setC[at] ?? 0) - (supplyAimC[at] ?? 0));
    }
    if (capsSupply) edgeC = dryEdgeOfSupplyC(plan, at, edgeC);
    dryEdgeC[at] = edgeC;
  }
}

/** A stage that adds no moisture, the nth of the brief. */
function tryDry(plan: RoomPlan, _wetBulbs: WetBulbs, nth: number, stage: number): void {
  const { count } = room.wettable;
  const { onOff, effIndirect, effDewPoint } = plan;
  const risePerVolume = plan.riseKPerVolume[stage] ?? 0;
  for (let index = 0; index < count; index++) {
    const at = wettable[index] ?? 0;
    const tempC = dryBulbC[at] ?? 0;
    const ratio = humidityRatio[at] ?? 0;
    const fallK =
      stage === INDIRECT
        ? indirectFallK(effIndirect, tempC, wetBulbC[at] ?? 0)
        : dewPointFallK(effDewPoint, tempC, ratio, pressurePa[at] ?? 0);
    const dryC = tempC + risePerVolume * (volumeM3PerKg[at] ?? 0);
    const fullC = dryC - fallK;
    uncappedC[at] = Math.min(uncappedC[at] ?? 0, fullC);
    const lowestC = lowests[at] ?? 0;
    const edgeC = dryEdgeC[at] ?? 0;
    if (!(edgeC <= dryC) || !isBetter(fullC, lowestC, nth, lowestNths[at] ?? 0)) continue;
    if (onOff && !capsHoldAt(plan, at, fullC, ratio)) continue;
    const share = onOff ? 1 : shareFor(dryC, fallK, edgeC);
    const suppliedC = dryC - share * fallK;
    if (!isBetter(suppliedC, lowestC, nth, lowestNths[at] ?? 0)) continue;
    lowests[at] = suppliedC;
    lowestNths[at] = nth;
    lowestShares[at] = share;
  }
}

/** A stage that wets the supply, on the lines that are listed: `entersC` and `mediumWetC` of `room` are its own. */
function tryMoist(plan: RoomPlan, _wetBulbs: WetBulbs, nth: number): void {
  const { count } = room.lines;
  const { onOff, effDirect } = plan;
  for (let index = 0; index < count; index++) {
    const at = lines[index] ?? 0;
    const edgeC = onOff ? Number.NEGATIVE_INFINITY : (edges[at] ?? 0);
    const dryC = dries[at] ?? 0;
    if (!(edgeC <= dryC)) continue;
    const fallK = effDirect * ((entersC[at] ?? 0) - (mediumWetC[at] ?? 0));
    const share = onOff ? 1 : shareFor(dryC, fallK, edgeC);
    const suppliedC = dryC - share * fallK;
    if (!isBetter(suppliedC, lowests[at] ?? 0, nth, lowestNths[at] ?? 0)) continue;
    lowests[at] = suppliedC;
    lowestNths[at] = nth;
    lowestShares[at] = share;
  }
}

/** Lists the hours in which such a stage may give a lower supply than the stages before it; on-off: in which it does. */
function listLines(plan: RoomPlan, _wetBulbs: WetBulbs, nth: number, stage: number): void {
  const { count } = room.wettable;
  const { onOff, effDirect } = plan;
  const risePerVolume = plan.riseKPerVolume[stage] ?? 0;
  let lineCount = 0;
  for (let index = 0; index < count; index++) {
    const at = wettable[index] ?? 0;
    const mediumC = entersC[at] ?? 0;
    const wetC = mediumWetC[at] ?? 0;
    const ratio = humidityRatio[at] ?? 0;
    const riseK = risePerVolume * (volumeM3PerKg[at] ?? 0);
    const dryC = mediumC + riseK;
    const fullC = dryC - effDirect * (mediumC - wetC);
    uncappedC[at] = Math.min(uncappedC[at] ?? 0, fullC);
    const lowestC = lowests[at] ?? 0;
    if (!isBetter(fullC, lowestC, nth, lowestNths[at] ?? 0)) continue;
    // Not even the moisture of outdoor air would allow a lower supply.
    if ((dryEdgeC[at] ?? 0) >= lowestC - ROUNDING_K) continue;
    const top = lineTop(ratio, mediumC, wetC);
    const bottom = lineBottom(wetC);
    if (onOff) {
      if (!capsHoldAt(plan, at, fullC, Math.max(ratio, ratioOnLine(top, bottom, fullC - riseK)))) continue;
    } else if (lowestC < dryC && clearlyOverRoomCap(plan, at, lowestC, ratioOnLine(top, bottom, lowestC - riseK))) {
      // Nor does the moisture that this stage has added there.
      continue;
    }
    tops[at] = top;
    bottoms[at] = bottom;
    fanRises[at] = riseK;
    dries[at] = dryC;
    fulls[at] = fullC;
    lines[lineCount++] = at;
  }
  room.lines.count = lineCount;
}

/** Lower, or as low and earlier in the brief's order. */
function isBetter(supplyC: number, lowestC: number, nth: number, lowestNth: number): boolean {
  return supplyC < lowestC || (supplyC === lowestC && nth < lowestNth);
}

function capsHoldAt(plan: RoomPlan, at: number, supplyC: number, ratio: number): boolean {
  if (supplyC <= (supplyAimC[at] ?? 0) + ROUNDING_K) return ratio < (ratioUnderCaps[at] ?? 0);
  return capsHoldOnWarmSupply(plan, at, supplyC, ratio);
}
