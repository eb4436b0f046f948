/**
 * The caps of a brief on one supply of one hour, asked as pressures of vapour and humidity ratios, so that no hour computes a
 * relative humidity (method 4): on the supply itself and on the room, the supply no colder than it need be.
 */
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import type { HourColumns } from '../hour-columns.ts';
import type { RoomHours } from './room-hours.ts';
import type { RoomPlan } from './room-plan.ts';

/** Ratio of the molar masses of water and dry air. */
const MASS_RATIO = 0.621945;
/** A stage run at just the share that it needs ends here or a rounding error above. */
const ROUNDING_K = 1e-9;

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

/** Whether the caps hold on a supply in the hour at a place. */
export function capsHold(
  plan: RoomPlan,
  hours: HourColumns,
  room: RoomHours,
  at: number,
  supplyC: number,
  supplyRatio: number,
): boolean {
  const aimC = hours.supplyAimC[at] ?? 0;
  if (supplyC <= aimC + ROUNDING_K) return supplyRatio < (room.ratioUnderCaps[at] ?? 0);
  return capsHoldOnWarmSupply(plan, hours, at, supplyC, supplyRatio);
}

function capsHoldOnWarmSupply(
  plan: RoomPlan,
  hours: HourColumns,
  at: number,
  supplyC: number,
  supplyRatio: number,
): boolean {
  const pressurePa = hours.pressurePa[at] ?? 0;
  const riseK = (hours.setC[at] ?? 0) - (hours.supplyAimC[at] ?? 0);
  const roomPa = vapourPressurePa(supplyRatio + plan.dwRoomKgKg, pressurePa);
  if (!(roomPa < roomVapourPa(plan, supplyC + riseK))) return false;
  if (!plan.capsSupply) return true;
  return vapourPressurePa(supplyRatio, pressurePa) < supplyVapourPa(plan, supplyC);
}
