/**
 * What a wet stage supplies in one hour over its share x of full wetting (method 4), as a few numbers. Fed by outdoor air, every
 * stage cools in a straight line; its moisture stays, or climbs the line of constant wet bulb:
 *
 *   t_s = dry - x fall,   w_s = w   or   w_s = (top - 1.006 t') / (bottom + 1.86 t'),  t' = t_s - fan rise
 *
 * with top = L(x) Ws(x) + 1.006 x and bottom = 2501 - c x (2830 over ice) of the wet bulb x: ASHRAE Fundamentals 2017 ch. 1
 * eq. 33 and 35, as in `wet-bulb-line.ts`. By the balance that the wet bulb solves (`wet-surface.ts`) top is h + fusion w - c w x of
 * the air that enters, so that no saturation pressure is looked up.
 */

import { dewPointC, vapourPressurePa } from '../../psychrometrics/moist-air.ts';
import { tabledDewPointC, tabledSaturationPa, tabledSlopePaPerK } from '../../psychrometrics/saturation-table.ts';
import { ICE, WATER } from '../../psychrometrics/wet-surface.ts';
import { secondaryWaterKgPerKg } from '../../stages/indirect.ts';
import { runningStages } from '../hour-columns.ts';
import { capsHold, type RoomHour } from './room-hour.ts';
import type { RoomPlan } from './room-plan.ts';

const MASS_RATIO = 0.621945;
const AIR_KJ_PER_KG_K = 1.006;
const VAPOUR_KJ_PER_KG_K = 1.86;
const LATENT_KJ_PER_KG = 2501;

const DIRECT = runningStages.indexOf('direct');
const INDIRECT = runningStages.indexOf('indirect');
const DEWPOINT = runningStages.indexOf('dewpoint');

export interface SupplyLine {
  /** Position in `runningStages`. */
  stage: number;
  riseK: number;
  dryC: number;
  fallK: number;
  /** Whether x adds moisture to the supply. */
  moist: boolean;
  top: number;
  bottom: number;
  /** Water that a stage before it evaporates whatever x, kg/kg. */
  firstWater: number;
  /** Temperature of the water, °C. */
  waterC: number;
}

export function supplyLine(stage: number): SupplyLine {
  const none = Number.NaN;
  return {
    stage,
    riseK: none,
    dryC: none,
    fallK: none,
    moist: false,
    top: none,
    bottom: none,
    firstWater: 0,
    waterC: none,
  };
}

/** Fills in a line for an hour whose wet bulb is known. */
export function layLine(line: SupplyLine, plan: RoomPlan, hour: RoomHour): void {
  const { dryBulbC, wetBulbC: wetC } = hour;
  line.riseK = (plan.riseKPerVolume[line.stage] ?? 0) * hour.volumeM3PerKg;
  line.dryC = dryBulbC + line.riseK;
  line.waterC = wetC;
  line.moist = false;
  line.firstWater = 0;
  if (line.stage === DIRECT) {
    line.fallK = plan.effDirect * (dryBulbC - wetC);
    wetLine(line, hour, dryBulbC, wetC);
  } else if (line.stage === INDIRECT) {
    line.fallK = indirectFallK(plan, hour);
  } else if (line.stage === DEWPOINT) {
    line.fallK = plan.effDewPoint * (dryBulbC - dewPointC(dryBulbC, hour.humidityRatio, hour.pressurePa));
  } else {
    layTwoStage(line, plan, hour);
  }
}

export function indirectFallK(plan: RoomPlan, hour: RoomHour): number {
  return Math.max(0, plan.effIndirect * (hour.dryBulbC - hour.wetBulbC));
}

/** Indirect at full effect to t1, then direct from there. */
function layTwoStage(line: SupplyLine, plan: RoomPlan, hour: RoomHour): void {
  const firstFallK = indirectFallK(plan, hour);
  const betweenC = hour.dryBulbC - firstFallK;
  const betweenWetC = hour.secondWetBulbC;
  line.dryC = betweenC + line.riseK;
  line.fallK = plan.effDirect * (betweenC - betweenWetC);
  line.firstWater = secondaryWaterKgPerKg(firstFallK, plan.k);
  line.waterC = Math.max(hour.wetBulbC, betweenWetC);
  wetLine(line, hour, betweenC, betweenWetC);
}

function wetLine(line: SupplyLine, hour: RoomHour, entersC: number, wetC: number): void {
  const { humidityRatio: w } = hour;
  const surface = wetC >= 0 ? WATER : ICE;
  const enthalpy = AIR_KJ_PER_KG_K * entersC + w * (LATENT_KJ_PER_KG + VAPOUR_KJ_PER_KG_K * entersC);
  line.moist = true;
  line.top = enthalpy + w * (surface.fusionKJPerKg - surface.surfaceKJPerKgK * wetC);
  line.bottom = surface.latentKJPerKg - surface.surfaceKJPerKgK * wetC;
}

export function supplyAt(line: SupplyLine, share: number): number {
  return line.dryC - share * line.fallK;
}

/** Humidity ratio of the supply, kg/kg. */
export function ratioAt(line: SupplyLine, hour: RoomHour, share: number): number {
  if (!line.moist || !(share > 0)) return hour.humidityRatio;
  const leavingC = supplyAt(line, share) - line.riseK;
  const onLine = (line.top - AIR_KJ_PER_KG_K * leavingC) / (line.bottom + VAPOUR_KJ_PER_KG_K * leavingC);
  return Math.max(hour.humidityRatio, onLine);
}

/** Water evaporated, kg per kg of dry air. */
export function evaporatedAt(line: SupplyLine, plan: RoomPlan, hour: RoomHour, share: number): number {
  if (line.moist) return line.firstWater + (ratioAt(line, hour, share) - hour.humidityRatio);
  return secondaryWaterKgPerKg(share * line.fallK, plan.k);
}

/** The least share at which the supply is at most a temperature; 1 when it never is. */
export function shareFor(line: SupplyLine, supplyC: number): number {
  const wantedK = line.dryC - supplyC;
  if (wantedK <= 0) return 0;
  return line.fallK > 0 ? Math.min(wantedK / line.fallK, 1) : 1;
}

/**
 * The largest share at which the caps hold, where they hold at none of full wetting and the supply stays above what is asked; NaN
 * where they hold at no share. More wetting is never drier and never warmer, so the shares within the caps end at one place.
 */
export function shareWithinCaps(line: SupplyLine, plan: RoomPlan, hour: RoomHour): number {
  if (plan.onOff) return capsHold(plan, hour, supplyAt(line, 1), ratioAt(line, hour, 1)) ? 1 : Number.NaN;
  const roomC = edgeC(line, hour, plan.roomShare, hour.roomRiseK, plan.dwRoomKgKg);
  const supplyC = edgeC(line, hour, plan.supplyShare, 0, 0);
  const coldestC = Math.max(roomC, supplyC, dewPointEdgeC(line, plan, hour));
  return coldestC <= line.dryC ? shareFor(line, coldestC) : Number.NaN;
}

/** The chord lands within a kelvin; two steps leave some 0.00001 K. */
const NEWTON_STEPS = 2;

/**
 * The supply temperature at which a cap on relative humidity is just reached; -Infinity when full wetting keeps it, Infinity when
 * no share does. Vapour less
 * the share of saturation is a concave function that falls with temperature: the chord between full wetting and none lands on
 * its wet side, and steps of Newton's method come back from the dry side, within the cap. Plain arguments here and below: an object
 * for every hour would cost as much as the answer.
 * @param share of saturation that the cap allows
 * @param riseK by which the air that is capped is warmer than the supply, and
 * @param addedRatio the moisture that it has taken up: 0 and 0 for the supply itself
 */
function edgeC(line: SupplyLine, hour: RoomHour, share: number, riseK: number, addedRatio: number): number {
  if (share === Number.POSITIVE_INFINITY) return Number.NEGATIVE_INFINITY;
  if (!line.moist) {
    const vapourPa = vapourPressurePa(hour.humidityRatio + addedRatio, hour.pressurePa);
    return tabledDewPointC(vapourPa / share) - riseK;
  }
  const wetC = supplyAt(line, 1);
  const wetExcess = excessPa(line, hour, wetC, share, riseK, addedRatio);
  if (wetExcess < 0) return Number.NEGATIVE_INFINITY;
  const dryExcess = excessPa(line, hour, line.dryC, share, riseK, addedRatio);
  if (dryExcess >= 0) return Number.POSITIVE_INFINITY;
  let x = wetC + ((line.dryC - wetC) * wetExcess) / (wetExcess - dryExcess);
  for (let step = 0; step < NEWTON_STEPS; step++) {
    x = nearerEdgeC(line, hour, x, share, riseK, addedRatio);
  }
  return x;
}

/** Vapour over what the cap allows, Pa, with a supply at this temperature on a moist line. */
function excessPa(
  line: SupplyLine,
  hour: RoomHour,
  supplyC: number,
  share: number,
  riseK: number,
  addedRatio: number,
): number {
  const leavingC = supplyC - line.riseK;
  const ratio = (line.top - AIR_KJ_PER_KG_K * leavingC) / (line.bottom + VAPOUR_KJ_PER_KG_K * leavingC);
  return vapourPressurePa(ratio + addedRatio, hour.pressurePa) - share * tabledSaturationPa(supplyC + riseK);
}

/** One step of Newton's method towards no excess. */
function nearerEdgeC(
  line: SupplyLine,
  hour: RoomHour,
  supplyC: number,
  share: number,
  riseK: number,
  addedRatio: number,
): number {
  const leavingC = supplyC - line.riseK;
  const perBottom = 1 / (line.bottom + VAPOUR_KJ_PER_KG_K * leavingC);
  const ratio = (line.top - AIR_KJ_PER_KG_K * leavingC) * perBottom;
  const ratioSlope = -(AIR_KJ_PER_KG_K + VAPOUR_KJ_PER_KG_K * ratio) * perBottom;
  const perTotal = 1 / (MASS_RATIO + ratio + addedRatio);
  const roomC = supplyC + riseK;
  const excess = hour.pressurePa * (ratio + addedRatio) * perTotal - share * tabledSaturationPa(roomC);
  const vapourSlope = hour.pressurePa * MASS_RATIO * ratioSlope * perTotal * perTotal;
  return supplyC - excess / (vapourSlope - share * tabledSlopePaPerK(roomC));
}

/** The same of the cap on the supply's dew point. */
function dewPointEdgeC(line: SupplyLine, plan: RoomPlan, hour: RoomHour): number {
  const capPa = plan.supplyVapourPa;
  if (capPa === Number.POSITIVE_INFINITY) return Number.NEGATIVE_INFINITY;
  const ratio = (MASS_RATIO * capPa) / (hour.pressurePa - capPa);
  if (hour.humidityRatio >= ratio) return Number.POSITIVE_INFINITY;
  if (!line.moist) return Number.NEGATIVE_INFINITY;
  return (line.top - ratio * line.bottom) / (AIR_KJ_PER_KG_K + VAPOUR_KJ_PER_KG_K * ratio) + line.riseK;
}
