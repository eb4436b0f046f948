import { vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledSaturationPa, tabledSlopePaPerK } from '../../psychrometrics/saturation-table.ts';
import { block } from '../hour-block.ts';
import { room } from './room-hours.ts';
import type { RoomPlan } from './room-plan.ts';
import { leavingWithRatioC, ratioOnLine } from './supply-lines.ts';

/** Dry air and vapour, kJ/(kg K): ASHRAE Fundamentals 2017 ch. 1 eq. 30. */
const AIR_KJ_PER_KG_K = 1.006;
const VAPOUR_KJ_PER_KG_K = 1.86;
const MASS_RATIO = 0.621945;
/** The chord lands within a kelvin; two steps leave some 0.00001 K. */
const NEWTON_STEPS = 2;

/** Constants of this module: see `hour-block.ts`. */
const { humidityRatio: ratios, pressurePa: pressures, setC, supplyAimC } = block;
const { top: tops, bottom: bottoms, fanRiseK: fanRises, dryC: dries, fullC: fulls } = room;

/**
 * The supply temperature, °C, at which the first cap is just reached on the moist line that `room` holds for the hour at a place;
 * -Infinity when full wetting keeps them all, Infinity when no share does.
 */
export function moistEdgeC(plan: RoomPlan, at: number): number {
  const { roomShare, supplyShare, supplyVapourPa } = plan;
  let edgeC = Number.NEGATIVE_INFINITY;
  if (roomShare !== Number.POSITIVE_INFINITY) edgeC = edgeUnderCapC(plan, at, true);
  if (supplyShare !== Number.POSITIVE_INFINITY) edgeC = Math.max(edgeC, edgeUnderCapC(plan, at, false));
  if (supplyVapourPa === Number.POSITIVE_INFINITY) return edgeC;
  const ratio = (MASS_RATIO * supplyVapourPa) / ((pressures[at] ?? 0) - supplyVapourPa);
  if ((ratios[at] ?? 0) >= ratio) return Number.POSITIVE_INFINITY;
  const leavingC = leavingWithRatioC(tops[at] ?? 0, bottoms[at] ?? 0, ratio);
  return Math.max(edgeC, leavingC + (fanRises[at] ?? 0));
}

/**
 * The same of one cap on relative humidity. Vapour less the share of saturation is a concave function that falls with temperature: the
 * chord between full wetting and none lands on its wet side, and steps of Newton's method come back from the dry side, within the cap.
 * @param ofRoom whether it is the cap on the room, whose air is warmer and has taken up moisture; else that on the supply itself
 */
function edgeUnderCapC(plan: RoomPlan, at: number, ofRoom: boolean): number {
  const share = ofRoom ? plan.roomShare : plan.supplyShare;
  const addedRatio = ofRoom ? plan.dwRoomKgKg : 0;
  const riseK = ofRoom ? (setC[at] ?? 0) - (supplyAimC[at] ?? 0) : 0;
  const pressurePa = pressures[at] ?? 0;
  const top = tops[at] ?? 0;
  const bottom = bottoms[at] ?? 0;
  const fanRiseK = fanRises[at] ?? 0;
  const dryC = dries[at] ?? 0;
  const fullC = fulls[at] ?? 0;
  const fullRatio = ratioOnLine(top, bottom, fullC - fanRiseK) + addedRatio;
  const fullExcess = vapourPressurePa(fullRatio, pressurePa) - share * tabledSaturationPa(fullC + riseK);
  if (fullExcess < 0) return Number.NEGATIVE_INFINITY;
  const dryRatio = ratioOnLine(top, bottom, dryC - fanRiseK) + addedRatio;
  const dryExcess = vapourPressurePa(dryRatio, pressurePa) - share * tabledSaturationPa(dryC + riseK);
  if (!(dryExcess < 0)) return Number.POSITIVE_INFINITY;
  let edgeC = fullC + ((dryC - fullC) * fullExcess) / (fullExcess - dryExcess);
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
  return edgeC;
}
