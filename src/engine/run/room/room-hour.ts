/**
 * One hour of a room, filled in anew for each slot: outdoor air, what is asked of the supply, and what the caps allow at the two
 * temperatures at which they are asked for most. Numbers only, so that no hour leaves anything behind.
 */
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import type { RoomPlan } from './room-plan.ts';

export interface RoomHour {
  dryBulbC: number;
  humidityRatio: number;
  pressurePa: number;
  volumeM3PerKg: number;
  wetBulbC: number;
  setC: number;
  supplyAimC: number;
  loadFraction: number;
  /** dT_room phi, K. */
  roomRiseK: number;
  /** t + f of outdoor air. */
  airC: number;
  /** t_sup in whole hundredths. */
  aimHundredths: number;
  frozen: boolean;
  /** Outdoor moisture itself breaks a cap where the room is to be held. */
  dampOutside: boolean;
  /** The wet stages may run, and their lines are laid. */
  wet: boolean;
  /** Most vapour that the caps allow where the supply is no colder than it need be, Pa: in the room, in the supply. */
  roomVapourAtAimPa: number;
  supplyVapourAtAimPa: number;
}

export function roomHour(): RoomHour {
  const none = Number.NaN;
  return {
    dryBulbC: none,
    humidityRatio: none,
    pressurePa: none,
    volumeM3PerKg: none,
    wetBulbC: none,
    setC: none,
    supplyAimC: none,
    loadFraction: none,
    roomRiseK: none,
    airC: none,
    aimHundredths: none,
    frozen: false,
    dampOutside: false,
    wet: false,
    roomVapourAtAimPa: none,
    supplyVapourAtAimPa: none,
  };
}

/** Most vapour that the caps on the room allow with a supply at this temperature, Pa. */
export function roomVapourPa(plan: RoomPlan, hour: RoomHour, supplyC: number): number {
  if (plan.roomShare === Number.POSITIVE_INFINITY) return plan.roomShare;
  return plan.roomShare * tabledSaturationPa(supplyC + hour.roomRiseK);
}

/** The same of the caps on the supply. */
export function supplyVapourPa(plan: RoomPlan, supplyC: number): number {
  if (plan.supplyShare === Number.POSITIVE_INFINITY) return plan.supplyVapourPa;
  return Math.min(plan.supplyVapourPa, plan.supplyShare * tabledSaturationPa(supplyC));
}

/** Whether the caps hold on a supply: on the supply itself and on the room, the supply no colder than it need be (method 4). */
export function capsHold(plan: RoomPlan, hour: RoomHour, supplyC: number, supplyRatio: number): boolean {
  const colder = supplyC <= hour.supplyAimC;
  const roomPa = vapourPressurePa(supplyRatio + plan.dwRoomKgKg, hour.pressurePa);
  if (!(roomPa < (colder ? hour.roomVapourAtAimPa : roomVapourPa(plan, hour, supplyC)))) return false;
  const supplyPa = vapourPressurePa(supplyRatio, hour.pressurePa);
  return supplyPa < (colder ? hour.supplyVapourAtAimPa : supplyVapourPa(plan, supplyC));
}
