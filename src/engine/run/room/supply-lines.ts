/**
 * What a wet stage supplies in one hour over its share x of full wetting (method 4), as a few numbers. Fed by outdoor air, every
 * stage cools in a straight line; its moisture stays, or climbs the line of constant wet bulb of the air that enters the medium:
 *
 *   t_s = dry - x fall,   w_s = w   or   w_s = (top - 1.006 t') / (bottom + 1.86 t'),  t' = t_s - fan rise
 *
 * with top = L(x) Ws(x) + 1.006 x and bottom = 2501 - c x (2830 over ice) of the wet bulb x: ASHRAE Fundamentals 2017 ch. 1
 * eq. 33 and 35, as in `wet-bulb-line.ts`. By the balance that the wet bulb solves (`wet-surface.ts`) top is h + fusion w - c w x of
 * the air that enters, so that no saturation pressure is looked up.
 *
 * Small functions of numbers: what calls them in a loop is compiled with them in it, and no number leaves the processor.
 */
import { dewPointC } from '../../psychrometrics/moist-air.ts';
import { ICE, WATER } from '../../psychrometrics/wet-surface.ts';

const AIR_KJ_PER_KG_K = 1.006;
const VAPOUR_KJ_PER_KG_K = 1.86;
const LATENT_KJ_PER_KG = 2501;
const water = WATER;
const ice = ICE;

/** How far an indirect stage cools at full effect, K: warmer secondary air cools nothing. */
export function indirectFallK(effIndirect: number, dryBulbC: number, wetBulbC: number): number {
  return Math.max(0, effIndirect * (dryBulbC - wetBulbC));
}

/** The same of a dew-point stage, K. */
export function dewPointFallK(
  effDewPoint: number,
  dryBulbC: number,
  humidityRatio: number,
  pressurePa: number,
): number {
  return effDewPoint * (dryBulbC - dewPointC(dryBulbC, humidityRatio, pressurePa));
}

/** The least share at which the supply is at most a temperature; 1 when it never is. */
export function shareFor(dryC: number, fallK: number, supplyC: number): number {
  const wantedK = dryC - supplyC;
  if (wantedK <= 0) return 0;
  return wantedK < fallK ? wantedK / fallK : 1;
}

/** Of a moist line, kJ/kg: what is shared out between heat and vapour. */
export function lineTop(humidityRatio: number, entersC: number, wetC: number): number {
  const enthalpy = AIR_KJ_PER_KG_K * entersC + humidityRatio * (LATENT_KJ_PER_KG + VAPOUR_KJ_PER_KG_K * entersC);
  return wetC >= 0
    ? enthalpy + humidityRatio * (water.fusionKJPerKg - water.surfaceKJPerKgK * wetC)
    : enthalpy + humidityRatio * (ice.fusionKJPerKg - ice.surfaceKJPerKgK * wetC);
}

/** What a kilogram of vapour takes of it at 0 °C. */
export function lineBottom(wetC: number): number {
  return wetC >= 0
    ? water.latentKJPerKg - water.surfaceKJPerKgK * wetC
    : ice.latentKJPerKg - ice.surfaceKJPerKgK * wetC;
}

/** Humidity ratio on the line, kg/kg, of air that leaves the medium at a temperature. */
export function ratioOnLine(top: number, bottom: number, leavingC: number): number {
  return (top - AIR_KJ_PER_KG_K * leavingC) / (bottom + VAPOUR_KJ_PER_KG_K * leavingC);
}

/** The temperature, °C, at which air with this humidity ratio leaves the medium. */
export function leavingWithRatioC(top: number, bottom: number, ratio: number): number {
  return (top - ratio * bottom) / (AIR_KJ_PER_KG_K + VAPOUR_KJ_PER_KG_K * ratio);
}
