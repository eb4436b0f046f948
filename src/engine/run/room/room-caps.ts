/**
 * The caps of a brief on one supply of one hour, asked as pressures of vapour and humidity ratios, so that no hour computes a
 * relative humidity (method 4): on the supply itself and on the room, the supply no colder than it need be.
 */
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledDewPointC, tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import { block } from '../hour-block.ts';
import type { RoomPlan } from './room-plan.ts';

/** Ratio of the molar masses of water and dry air. */
const MASS_RATIO = 0.621945;
/** A stage run at just the share that it needs ends here or a rounding error above. */
export const ROUNDING_K = 1e-9;

/** Constants of this module: see `hour-block.ts`. */
const { humidityRatio: ratios, pressurePa: pressures, setC, supplyAimC } = block;

/** Most vapour that the caps on the room allow in a room at this temperature, Pa. */
export function roomVapourPa({ roomShare }: RoomPlan, roomC: number): number {
  return roomShare === Number.POSITIVE_INFINITY ? roomShare : roomShare * tabledSaturationPa(roomC);
}

/** The same of the caps on the supply. */
export function supplyVapourPa({ supplyShare, supplyVapourPa: mostPa }: RoomPlan, supplyC: number): number {
  if (supplyShare === Number.POSITIVE_INFINITY) return mostPa;
  return Math.min(mostPa, supplyShare * tabledSaturationPa(supplyC));
}

/** Humidity ratio of a pressure of vapour; without end where that passes the pressure of the air. */
export function ratioOfVapour(vapourPa: number, pressurePa: number): number {
  return vapourPa < pressurePa ? (MASS_RATIO * vapourPa) / (pressurePa - vapourPa) : Number.POSITIVE_INFINITY;
}

/**
 * Whether the caps hold on a supply in the hour at a place that is warmer than it need be. Of one that is not, `ratioUnderCaps` of
 * `room` tells.
 */
export function capsHoldOnWarmSupply(plan: RoomPlan, at: number, supplyC: number, supplyRatio: number): boolean {
  const pressurePa = pressures[at] ?? 0;
  const riseK = (setC[at] ?? 0) - (supplyAimC[at] ?? 0);
  const roomPa = vapourPressurePa(supplyRatio + plan.dwRoomKgKg, pressurePa);
  if (!(roomPa < roomVapourPa(plan, supplyC + riseK))) return false;
  return !plan.capsSupply || supplyCapsHold(plan, at, supplyC, supplyRatio);
}

/** The same of the caps on the supply alone. */
export function supplyCapsHold(plan: RoomPlan, at: number, supplyC: number, supplyRatio: number): boolean {
  return vapourPressurePa(supplyRatio, pressures[at] ?? 0) < supplyVapourPa(plan, supplyC);
}

/** So much vapour over a cap is no rounding error, Pa. */
const CLEARLY_PA = 0.01;

/** Whether a supply that is no colder than it need be breaks the cap on the room by more than rounding explains. */
export function clearlyOverRoomCap(plan: RoomPlan, at: number, supplyC: number, supplyRatio: number): boolean {
  if (plan.roomShare === Number.POSITIVE_INFINITY) return false;
  const riseK = (setC[at] ?? 0) - (supplyAimC[at] ?? 0);
  const vapourPa = vapourPressurePa(supplyRatio + plan.dwRoomKgKg, pressures[at] ?? 0);
  return vapourPa - plan.roomShare * tabledSaturationPa(supplyC + riseK) > CLEARLY_PA;
}

/**
 * The supply temperature, °C, at which the caps on the supply are just reached with the moisture of outdoor air, or `edgeC` where that
 * is higher; Infinity where none is warm enough.
 */
export function dryEdgeOfSupplyC(plan: RoomPlan, at: number, edgeC: number): number {
  const ratio = ratios[at] ?? 0;
  const pressurePa = pressures[at] ?? 0;
  let higherC = edgeC;
  if (plan.supplyShare !== Number.POSITIVE_INFINITY) {
    higherC = Math.max(edgeC, tabledDewPointC(vapourPressurePa(ratio, pressurePa) / plan.supplyShare));
  }
  if (plan.supplyVapourPa === Number.POSITIVE_INFINITY) return higherC;
  const mostRatio = (MASS_RATIO * plan.supplyVapourPa) / (pressurePa - plan.supplyVapourPa);
  return ratio >= mostRatio ? Number.POSITIVE_INFINITY : higherC;
}
