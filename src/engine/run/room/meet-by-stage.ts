/**
 * Hours in which a stage reaches t_sup within the caps, with the x that just does (on-off: x = 1). The stage runs where none before it
 * in the brief's order did; elsewhere it is only marked as able to.
 */
import { dewPointC } from '../../psychrometrics/moist-air.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { type HourColumns, runningStages } from '../hour-columns.ts';
import { capsHold } from './room-caps.ts';
import type { RoomHours } from './room-hours.ts';
import { CLASS_OF_STAGE, type RoomPlan, UNDECIDED } from './room-plan.ts';
import { indirectFallK, lineBottom, lineTop, ratioOnLine, shareFor } from './supply-lines.ts';
import { secondWetBulbAt, type WetBulbs } from './wet-bulbs-of-year.ts';

const DIRECT = runningStages.indexOf('direct');
const INDIRECT = runningStages.indexOf('indirect');
const DEWPOINT = runningStages.indexOf('dewpoint');
const TWO_STAGE = runningStages.indexOf('twostage');

/** Whether a stage adds moisture to the supply. */
export function addsMoisture(stage: number): boolean {
  return stage === DIRECT || stage === TWO_STAGE;
}

/** What a stage needs to know of each hour in which water may run, before it is asked. */
export function prepareStage(
  stage: number,
  plan: RoomPlan,
  hours: HourColumns,
  room: RoomHours,
  wetBulbs: WetBulbs,
): void {
  if (stage === DEWPOINT) prepareDewPoint(plan, hours, room);
  if (stage === TWO_STAGE) prepareTwoStage(plan, hours, room, wetBulbs);
}

function prepareDewPoint(plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  const { places, count } = room.unmetByAir;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    if (room.mayWet[at] === 0) continue;
    const tempC = hours.dryBulbC[at] ?? 0;
    const dewC = dewPointC(tempC, hours.humidityRatio[at] ?? 0, hours.pressurePa[at] ?? 0);
    room.dewPointFallK[at] = plan.effDewPoint * (tempC - dewC);
  }
}

/** Indirect at full effect to t1, then direct from there. */
function prepareTwoStage(plan: RoomPlan, hours: HourColumns, room: RoomHours, wetBulbs: WetBulbs): void {
  const { places, count } = room.unmetByAir;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    if (room.mayWet[at] === 0) continue;
    const tempC = hours.dryBulbC[at] ?? 0;
    const betweenC = tempC - indirectFallK(plan.effIndirect, tempC, room.wetBulbC[at] ?? 0);
    room.betweenC[at] = betweenC;
    room.betweenWetC[at] = secondWetBulbAt(wetBulbs, hours, at, betweenC);
  }
}

export function meetByStage(stage: number, plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  if (stage === DIRECT) meetMoist(stage, hours.dryBulbC, room.wetBulbC, plan, hours, room);
  else if (stage === TWO_STAGE) meetMoist(stage, room.betweenC, room.betweenWetC, plan, hours, room);
  else meetDry(stage, plan, hours, room);
}

/** Indirect and dew-point stages, whose supply keeps the moisture of outdoor air. */
function meetDry(stage: number, plan: RoomPlan, hours: HourColumns, room: RoomHours): void {
  const { places, count } = room.wet;
  const riseKPerVolume = plan.riseKPerVolume[stage] ?? 0;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const dryC = (hours.dryBulbC[at] ?? 0) + riseKPerVolume * (hours.volumeM3PerKg[at] ?? 0);
    const fallK = dryFallK(stage, plan, hours, room, at);
    if (!(100 * (dryC - fallK) < (room.aimEdge[at] ?? 0))) continue;
    const share = plan.onOff ? 1 : shareFor(dryC, fallK, hours.supplyAimC[at] ?? 0);
    const supplyC = dryC - share * fallK;
    const ratio = hours.humidityRatio[at] ?? 0;
    if (!capsHold(plan, hours, room, at, supplyC, ratio)) continue;
    hours.aloneMet[at] = (hours.aloneMet[at] ?? 0) | (1 << stage);
    if (hours.classCode[at] !== UNDECIDED) continue;
    hours.classCode[at] = CLASS_OF_STAGE[stage] ?? 0;
    runDry(stage, plan, hours, room, at, supplyC, share, fallK);
  }
}

/** How far a stage that adds no moisture cools at full effect, K. */
export function dryFallK(stage: number, plan: RoomPlan, hours: HourColumns, room: RoomHours, at: number): number {
  if (stage !== INDIRECT) return room.dewPointFallK[at] ?? 0;
  return indirectFallK(plan.effIndirect, hours.dryBulbC[at] ?? 0, room.wetBulbC[at] ?? 0);
}

/**
 * Stages that end in a wetted medium.
 * @param entersC the air that enters it, by place: outdoor air, or that between two stages; and its wet bulb
 */
function meetMoist(
  stage: number,
  entersC: Float64Array,
  entersWetC: Float64Array,
  plan: RoomPlan,
  hours: HourColumns,
  room: RoomHours,
): void {
  const { places, count } = room.wet;
  const riseKPerVolume = plan.riseKPerVolume[stage] ?? 0;
  for (let index = 0; index < count; index++) {
    const at = places[index] ?? 0;
    const mediumC = entersC[at] ?? 0;
    const wetC = entersWetC[at] ?? 0;
    const riseK = riseKPerVolume * (hours.volumeM3PerKg[at] ?? 0);
    const dryC = mediumC + riseK;
    const fallK = plan.effDirect * (mediumC - wetC);
    if (!(100 * (dryC - fallK) < (room.aimEdge[at] ?? 0))) continue;
    const share = plan.onOff ? 1 : shareFor(dryC, fallK, hours.supplyAimC[at] ?? 0);
    const supplyC = dryC - share * fallK;
    const outdoorRatio = hours.humidityRatio[at] ?? 0;
    const top = lineTop(outdoorRatio, mediumC, wetC);
    const ratio =
      share > 0 ? Math.max(outdoorRatio, ratioOnLine(top, lineBottom(wetC), supplyC - riseK)) : outdoorRatio;
    if (!capsHold(plan, hours, room, at, supplyC, ratio)) continue;
    hours.aloneMet[at] = (hours.aloneMet[at] ?? 0) | (1 << stage);
    if (hours.classCode[at] !== UNDECIDED) continue;
    hours.classCode[at] = CLASS_OF_STAGE[stage] ?? 0;
    runMoist(stage, plan, hours, room, at, supplyC, share, ratio);
  }
}

/** A stage that adds no moisture runs in an hour. */
export function runDry(
  stage: number,
  plan: RoomPlan,
  hours: HourColumns,
  room: RoomHours,
  at: number,
  supplyC: number,
  share: number,
  fallK: number,
): void {
  hours.running[at] = stage;
  hours.supplyC[at] = supplyC;
  hours.share[at] = share;
  hours.evaporatedKgPerKg[at] = secondaryWaterKgPerKg(share * fallK, plan.k);
  hours.waterC[at] = room.wetBulbC[at] ?? 0;
}

/** A stage that ends in a wetted medium runs in an hour, and the indirect one before it, if there is one, at full effect. */
export function runMoist(
  stage: number,
  plan: RoomPlan,
  hours: HourColumns,
  room: RoomHours,
  at: number,
  supplyC: number,
  share: number,
  ratio: number,
): void {
  const wetC = room.wetBulbC[at] ?? 0;
  const gained = ratio - (hours.humidityRatio[at] ?? 0);
  hours.running[at] = stage;
  hours.supplyC[at] = supplyC;
  hours.share[at] = share;
  hours.supplyRatio[at] = ratio;
  if (stage === TWO_STAGE) {
    const firstFallK = indirectFallK(plan.effIndirect, hours.dryBulbC[at] ?? 0, wetC);
    hours.evaporatedKgPerKg[at] = secondaryWaterKgPerKg(firstFallK, plan.k) + gained;
    hours.waterC[at] = Math.max(wetC, room.betweenWetC[at] ?? 0);
  } else {
    hours.evaporatedKgPerKg[at] = gained;
    hours.waterC[at] = wetC;
  }
}
