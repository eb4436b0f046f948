/**
 * One hour of a room, filled in anew for each slot: outdoor air, what is asked of the supply, and what the caps allow at the two
 * temperatures at which they are asked for most. Numbers only, so that no hour leaves anything behind.
 */
import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa } from '../../psychrometrics/saturation-table.ts';
import type { RoomPlan } from './room-plan.ts';

/** Ratio of the molar masses of water and dry air. */
const MASS_RATIO = 0.621945;

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
  /** Wet bulb after an indirect stage at full effect. */
  secondWetBulbC: number;
  /** Supplies with less moisture than this keep the caps where they are no colder than they need be, kg/kg. */
  ratioUnderCaps: number;
  /** Most vapour that the caps allow there, Pa, in the room and in the supply, and the temperatures that they are for. */
  roomVapourAtAimPa: number;
  supplyVapourAtAimPa: number;
  capsOfSetC: number;
  capsOfAimC: number;
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
    secondWetBulbC: none,
    ratioUnderCaps: none,
    roomVapourAtAimPa: none,
    supplyVapourAtAimPa: none,
    capsOfSetC: none,
    capsOfAimC: none,
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

/** Works out what the caps allow where the supply is no colder than it need be; the same temperatures keep what they had. */
export function meetCaps(plan: RoomPlan, hour: RoomHour): void {
  if (hour.setC !== hour.capsOfSetC || hour.supplyAimC !== hour.capsOfAimC) {
    hour.capsOfSetC = hour.setC;
    hour.capsOfAimC = hour.supplyAimC;
    hour.roomVapourAtAimPa = roomVapourPa(plan, hour, hour.supplyAimC);
    hour.supplyVapourAtAimPa = supplyVapourPa(plan, hour.supplyAimC);
  }
  const inRoom = ratioOf(hour.roomVapourAtAimPa, hour.pressurePa) - plan.dwRoomKgKg;
  if (hour.supplyVapourAtAimPa === Number.POSITIVE_INFINITY) hour.ratioUnderCaps = inRoom;
  else hour.ratioUnderCaps = Math.min(inRoom, ratioOf(hour.supplyVapourAtAimPa, hour.pressurePa));
}

/** Humidity ratio of a pressure of vapour; without end where that passes the pressure of the air. */
function ratioOf(vapourPa: number, pressurePa: number): number {
  return vapourPa < pressurePa ? (MASS_RATIO * vapourPa) / (pressurePa - vapourPa) : Number.POSITIVE_INFINITY;
}

/** A stage run at just the share that it needs ends here or a rounding error above. */
const ROUNDING_K = 1e-9;

/** Whether the caps hold on a supply: on the supply itself and on the room, the supply no colder than it need be (method 4). */
export function capsHold(plan: RoomPlan, hour: RoomHour, supplyC: number, supplyRatio: number): boolean {
  if (supplyC <= hour.supplyAimC + ROUNDING_K) return supplyRatio < hour.ratioUnderCaps;
  const roomPa = vapourPressurePa(supplyRatio + plan.dwRoomKgKg, hour.pressurePa);
  if (!(roomPa < roomVapourPa(plan, hour, supplyC))) return false;
  if (hour.supplyVapourAtAimPa === Number.POSITIVE_INFINITY) return true;
  return vapourPressurePa(supplyRatio, hour.pressurePa) < supplyVapourPa(plan, supplyC);
}
