/**
 * T* of method 3.1 for the hours that no stage meets: the lowest supply temperature, over air and every permitted stage, at which the
 * caps hold. More wetting is never drier and never warmer, so the shares within the caps end at one place, the edge.
 */
import { SLOTS_PER_LEAP_YEAR } from '../../conventions.ts';
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledDewPointC, tabledSaturationPa, tabledSlopePaPerK } from '../../psychrometrics/saturation-table.ts';
import { type HourColumns, runningStages } from '../hour-columns.ts';
import { addsMoisture, dryFallK, runDry, runMoist } from './meet-by-stage.ts';
import { capsHold } from './room-caps.ts';
import type { RoomHours } from './room-hours.ts';
import type { RoomPlan } from './room-plan.ts';
import {
  AIR_KJ_PER_KG_K,
  leavingWithRatioC,
  lineBottom,
  lineTop,
  ratioOnLine,
  shareFor,
  VAPOUR_KJ_PER_KG_K,
} from './supply-lines.ts';

const MASS_RATIO = 0.621945;
const DIRECT = runningStages.indexOf('direct');
/** A supply within a rounding error of what outdoor moisture allows is at it. */
const ROUNDING_K = 1e-9;
/** Stands for outdoor air among the stages, before all of them. */
const NO_STAGE = -1;

/**
 * Finds T* of every hour that is listed as unmet, with the stage and the share of wetting that give it. Stages that add no moisture
 * go first: where one of them reaches the temperature at which outdoor moisture alone is at the cap, no other can be colder, and most
 * damp hours end there. Of equals, the first in the brief's order gives it.
 */
export function findLowestSupplies(plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  lowestByAir(plan, hours, room);
  for (let nth = 0; nth < plan.stages.length; nth++) {
    const stage = plan.stages[nth] ?? 0;
    if (!addsMoisture(stage)) lowestByDry(stage, nth, plan, hours, room);
  }
  for (let nth = 0; nth < plan.stages.length; nth++) {
    const stage = plan.stages[nth] ?? 0;
    if (stage === DIRECT) lowestByMoist(stage, nth, hours.dryBulbC, room.wetBulbC, plan, hours, room);
    else if (addsMoisture(stage)) lowestByMoist(stage, nth, room.betweenC, room.betweenWetC, plan, hours, room);
  }
}

function lowestByAir(plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  const { places, count } = room.unmet;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const airC = hours.airSupplyC[at] ?? 0;
    const holds = capsHold(plan, hours, room, at, airC, hours.humidityRatio[at] ?? 0);
    room.lowestC[at] = holds ? airC : Number.POSITIVE_INFINITY;
    room.lowestNth[at] = NO_STAGE;
    room.lowestShare[at] = 0;
    room.uncappedC[at] = airC;
    room.dryEdgeC[at] = room.mayWet[at] === 1 && !plan.onOff ? dryEdgeC(plan, hours, at) : Number.NEGATIVE_INFINITY;
  }
}

/**
 * The supply temperature at which the caps are just reached with the moisture of outdoor air; -Infinity without caps, Infinity where
 * none is warm enough.
 */
function dryEdgeC(plan: RoomPlan, hours: HourColumns, at: number): number {
  const ratio = hours.humidityRatio[at] ?? 0;
  const pressurePa = hours.pressurePa[at] ?? 0;
  let edgeC = Number.NEGATIVE_INFINITY;
  if (plan.roomShare !== Number.POSITIVE_INFINITY) {
    const vapourPa = vapourPressurePa(ratio + plan.dwRoomKgKg, pressurePa);
    edgeC = tabledDewPointC(vapourPa / plan.roomShare) - ((hours.setC[at] ?? 0) - (hours.supplyAimC[at] ?? 0));
  }
  if (plan.supplyShare !== Number.POSITIVE_INFINITY) {
    edgeC = Math.max(edgeC, tabledDewPointC(vapourPressurePa(ratio, pressurePa) / plan.supplyShare));
  }
  if (plan.supplyVapourPa === Number.POSITIVE_INFINITY) return edgeC;
  const mostRatio = (MASS_RATIO * plan.supplyVapourPa) / (pressurePa - plan.supplyVapourPa);
  return ratio >= mostRatio ? Number.POSITIVE_INFINITY : edgeC;
}

function lowestByDry(stage: number, nth: number, plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  const { places, count } = room.unmet;
  const riseKPerVolume = plan.riseKPerVolume[stage] ?? 0;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    if (room.mayWet[at] === 0) continue;
    const dryC = (hours.dryBulbC[at] ?? 0) + riseKPerVolume * (hours.volumeM3PerKg[at] ?? 0);
    const fallK = dryFallK(stage, plan, hours, room, at);
    const fullC = dryC - fallK;
    room.uncappedC[at] = Math.min(room.uncappedC[at] ?? 0, fullC);
    if (!mayBeLower(room, at, fullC, nth)) continue;
    const edgeC = room.dryEdgeC[at] ?? 0;
    if (plan.onOff && !capsHold(plan, hours, room, at, fullC, hours.humidityRatio[at] ?? 0)) continue;
    if (edgeC <= dryC) keepLower(room, at, nth, plan.onOff ? 1 : shareFor(dryC, fallK, edgeC), dryC, fallK);
  }
}

/** Hours in which a moist stage may be the one that gives T*, with its line: see `supply-lines.ts`. */
interface Candidates {
  count: number;
  readonly places: Uint16Array;
  readonly top: Float64Array;
  readonly bottom: Float64Array;
  readonly fanRiseK: Float64Array;
  readonly dryC: Float64Array;
  readonly fallK: Float64Array;
  /** The supply at which a cap is just reached, °C: the highest of the caps. */
  readonly edgeC: Float64Array;
}

const numbers = () => new Float64Array(SLOTS_PER_LEAP_YEAR);
const workspace: Candidates = {
  count: 0,
  places: new Uint16Array(SLOTS_PER_LEAP_YEAR),
  top: numbers(),
  bottom: numbers(),
  fanRiseK: numbers(),
  dryC: numbers(),
  fallK: numbers(),
  edgeC: numbers(),
};

function lowestByMoist(
  stage: number,
  nth: number,
  entersC: Float64Array,
  entersWetC: Float64Array,
  plan: RoomPlan,
  hours: HourColumns,
  room: RoomHours,
): void {
  const some = workspace;
  findCandidates(some, stage, nth, entersC, entersWetC, plan, hours, room);
  if (plan.onOff) {
    keepFullWetting(some, nth, plan, hours, room);
    return;
  }
  some.edgeC.fill(Number.NEGATIVE_INFINITY, 0, some.count);
  if (plan.roomShare !== Number.POSITIVE_INFINITY) raiseToCap(some, hours, plan.roomShare, plan.dwRoomKgKg, true);
  if (plan.supplyShare !== Number.POSITIVE_INFINITY) raiseToCap(some, hours, plan.supplyShare, 0, false);
  if (plan.supplyVapourPa !== Number.POSITIVE_INFINITY) raiseToDewPoint(some, hours, plan.supplyVapourPa);
  keepEdges(some, nth, room);
}

/** Lists the hours in which a supply lower than what was found so far is not ruled out. */
function findCandidates(
  some: Candidates,
  stage: number,
  nth: number,
  entersC: Float64Array,
  entersWetC: Float64Array,
  plan: RoomPlan,
  hours: HourColumns,
  room: RoomHours,
): void {
  const { places, count } = room.unmet;
  const riseKPerVolume = plan.riseKPerVolume[stage] ?? 0;
  some.count = 0;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    if (room.mayWet[at] === 0) continue;
    const mediumC = entersC[at] ?? 0;
    const wetC = entersWetC[at] ?? 0;
    const riseK = riseKPerVolume * (hours.volumeM3PerKg[at] ?? 0);
    const dryC = mediumC + riseK;
    const fallK = plan.effDirect * (mediumC - wetC);
    const fullC = dryC - fallK;
    room.uncappedC[at] = Math.min(room.uncappedC[at] ?? 0, fullC);
    if (!mayBeLower(room, at, fullC, nth)) continue;
    const lowestC = room.lowestC[at] ?? 0;
    // Not even the moisture of outdoor air would allow a lower supply.
    if ((room.dryEdgeC[at] ?? 0) >= lowestC - ROUNDING_K) continue;
    const top = lineTop(hours.humidityRatio[at] ?? 0, mediumC, wetC);
    const bottom = lineBottom(wetC);
    // Nor does the moisture that this stage has added there.
    if (lowestC < dryC && overRoomCap(plan, hours, at, lowestC, ratioOnLine(top, bottom, lowestC - riseK))) continue;
    some.places[some.count] = at;
    some.top[some.count] = top;
    some.bottom[some.count] = bottom;
    some.fanRiseK[some.count] = riseK;
    some.dryC[some.count] = dryC;
    some.fallK[some.count] = fallK;
    some.count++;
  }
}

/** So much vapour over a cap is no rounding error, Pa. */
const CLEARLY_PA = 0.01;

function overRoomCap(plan: RoomPlan, hours: HourColumns, at: number, supplyC: number, ratio: number): boolean {
  if (plan.onOff || plan.roomShare === Number.POSITIVE_INFINITY) return false;
  const riseK = (hours.setC[at] ?? 0) - (hours.supplyAimC[at] ?? 0);
  const vapourPa = vapourPressurePa(ratio + plan.dwRoomKgKg, hours.pressurePa[at] ?? 0);
  return vapourPa - plan.roomShare * tabledSaturationPa(supplyC + riseK) > CLEARLY_PA;
}

function keepFullWetting(some: Candidates, nth: number, plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  for (let index = 0; index < some.count; index++) {
    const at = some.places[index] ?? 0;
    const dryC = some.dryC[index] ?? 0;
    const fallK = some.fallK[index] ?? 0;
    const fullC = dryC - fallK;
    const onLine = ratioOnLine(some.top[index] ?? 0, some.bottom[index] ?? 0, fullC - (some.fanRiseK[index] ?? 0));
    const ratio = Math.max(hours.humidityRatio[at] ?? 0, onLine);
    if (capsHold(plan, hours, room, at, fullC, ratio)) keepLower(room, at, nth, 1, dryC, fallK);
  }
}

function keepEdges(some: Candidates, nth: number, room: RoomHours): void {
  for (let index = 0; index < some.count; index++) {
    const dryC = some.dryC[index] ?? 0;
    const fallK = some.fallK[index] ?? 0;
    const edgeC = some.edgeC[index] ?? 0;
    if (edgeC <= dryC) keepLower(room, some.places[index] ?? 0, nth, shareFor(dryC, fallK, edgeC), dryC, fallK);
  }
}

/** Whether a stage's full wetting would be lower than what was found so far; of equals the first in the brief's order counts. */
function mayBeLower(room: RoomHours, at: number, fullC: number, nth: number): boolean {
  const lowestC = room.lowestC[at] ?? 0;
  return fullC < lowestC || (fullC === lowestC && nth < (room.lowestNth[at] ?? 0));
}

function keepLower(room: RoomHours, at: number, nth: number, share: number, dryC: number, fallK: number): void {
  const supplyC = dryC - share * fallK;
  if (!mayBeLower(room, at, supplyC, nth)) return;
  room.lowestC[at] = supplyC;
  room.lowestNth[at] = nth;
  room.lowestShare[at] = share;
}

/** The chord lands within a kelvin; two steps leave some 0.00001 K. */
const NEWTON_STEPS = 2;

/**
 * The supply temperature at which a cap on relative humidity is just reached on a moist line; -Infinity when full wetting keeps it,
 * Infinity when no share does. Vapour less the share of saturation is a concave function that falls with temperature: the chord
 * between full wetting and none lands on its wet side, and steps of Newton's method come back from the dry side, within the cap.
 * @param share of saturation that the cap allows
 * @param addedRatio the moisture that the air that is capped has taken up, kg/kg
 * @param ofRoom whether that is the air of the room, which is warmer than the supply; else the supply itself
 */
function raiseToCap(some: Candidates, hours: HourColumns, share: number, addedRatio: number, ofRoom: boolean): void {
  for (let index = 0; index < some.count; index++) {
    const at = some.places[index] ?? 0;
    const riseK = ofRoom ? (hours.setC[at] ?? 0) - (hours.supplyAimC[at] ?? 0) : 0;
    const pressurePa = hours.pressurePa[at] ?? 0;
    const top = some.top[index] ?? 0;
    const bottom = some.bottom[index] ?? 0;
    const fanRiseK = some.fanRiseK[index] ?? 0;
    const dryC = some.dryC[index] ?? 0;
    const wetC = dryC - (some.fallK[index] ?? 0);
    const wetRatio = ratioOnLine(top, bottom, wetC - fanRiseK) + addedRatio;
    const wetExcess = vapourPressurePa(wetRatio, pressurePa) - share * tabledSaturationPa(wetC + riseK);
    if (wetExcess < 0) continue;
    const dryRatio = ratioOnLine(top, bottom, dryC - fanRiseK) + addedRatio;
    const dryExcess = vapourPressurePa(dryRatio, pressurePa) - share * tabledSaturationPa(dryC + riseK);
    let edgeC = Number.POSITIVE_INFINITY;
    if (dryExcess < 0) {
      edgeC = wetC + ((dryC - wetC) * wetExcess) / (wetExcess - dryExcess);
      for (let step = 0; step < NEWTON_STEPS; step++) {
        const leavingC = edgeC - fanRiseK;
        const perBottom = 1 / (bottom + VAPOUR_KJ_PER_KG_K * leavingC);
        const ratio = (top - AIR_KJ_PER_KG_K * leavingC) * perBottom;
        const ratioSlope = -(AIR_KJ_PER_KG_K + VAPOUR_KJ_PER_KG_K * ratio) * perBottom;
        const perTotal = 1 / (MASS_RATIO + ratio + addedRatio);
        const cappedC = edgeC + riseK;
        const excess = pressurePa * (ratio + addedRatio) * perTotal - share * tabledSaturationPa(cappedC);
        const vapourSlope = pressurePa * MASS_RATIO * ratioSlope * perTotal * perTotal;
        edgeC -= excess / (vapourSlope - share * tabledSlopePaPerK(cappedC));
      }
    }
    some.edgeC[index] = Math.max(some.edgeC[index] ?? 0, edgeC);
  }
}

/** The same of the cap on the supply's dew point, whose vapour pressure is `capPa`. */
function raiseToDewPoint(some: Candidates, hours: HourColumns, capPa: number): void {
  for (let index = 0; index < some.count; index++) {
    const at = some.places[index] ?? 0;
    const ratio = (MASS_RATIO * capPa) / ((hours.pressurePa[at] ?? 0) - capPa);
    const edgeC =
      (hours.humidityRatio[at] ?? 0) >= ratio
        ? Number.POSITIVE_INFINITY
        : leavingWithRatioC(some.top[index] ?? 0, some.bottom[index] ?? 0, ratio) + (some.fanRiseK[index] ?? 0);
    some.edgeC[index] = Math.max(some.edgeC[index] ?? 0, edgeC);
  }
}

/** In `short` the stage and share that give T* run. */
export function runLowest(plan: RoomPlan, hours: HourColumns, room: RoomHours, at: number): void {
  const stage = plan.stages[room.lowestNth[at] ?? 0] ?? 0;
  const share = room.lowestShare[at] ?? 0;
  const supplyC = room.lowestC[at] ?? 0;
  if (!addsMoisture(stage)) {
    runDry(stage, plan, hours, room, at, supplyC, share, dryFallK(stage, plan, hours, room, at));
    return;
  }
  const direct = stage === DIRECT;
  const mediumC = (direct ? hours.dryBulbC[at] : room.betweenC[at]) ?? 0;
  const wetC = (direct ? room.wetBulbC[at] : room.betweenWetC[at]) ?? 0;
  const outdoorRatio = hours.humidityRatio[at] ?? 0;
  const riseK = (plan.riseKPerVolume[stage] ?? 0) * (hours.volumeM3PerKg[at] ?? 0);
  const onLine = ratioOnLine(lineTop(outdoorRatio, mediumC, wetC), lineBottom(wetC), supplyC - riseK);
  runMoist(stage, plan, hours, room, at, supplyC, share, share > 0 ? Math.max(outdoorRatio, onLine) : outdoorRatio);
}
