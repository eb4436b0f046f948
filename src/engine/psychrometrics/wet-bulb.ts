/**
 * Thermodynamic wet bulb: the one function that everything calls. PsychroLib inside (ASHRAE Fundamentals 2017 ch. 1
 * eq. 33 and 35, bisection to 0.001 K), with one rule of ours near 0 °C, where both an ice and a water wet bulb satisfy the
 * equations and PsychroLib returns either: the water root whenever h >= 2501 Ws(0 °C, p), else the ice root.
 */
import { enthalpyKJPerKg, saturationHumidityRatio } from './moist-air.ts';
import { psychrolib } from './psychrolib-si.ts';

/** Within this distance of 0 °C the root is always found anew: PsychroLib's may be the other one. */
const NEAR_ZERO_K = 1;
/**
 * Further out than this no state has two roots. They lie 0.94 K apart at most from 55 kPa up, and further only in the
 * thinner air that the pressure limits still allow.
 */
const TWO_ROOTS_WITHIN_K = 5;
const LATENT_HEAT_KJ_PER_KG = 2501;
const ROOT_TOLERANCE_K = 1e-5;
/** PsychroLib's floor for a humidity ratio. */
const DRIEST_HUMIDITY_RATIO = 1e-7;

interface WetSurface {
  /** Latent heat less the heat of the water or ice that evaporates, kJ/kg: L(x) = constant + slope x. */
  readonly latentKJPerKg: (wetBulbC: number) => number;
  /** Specific heat of the water or ice, kJ/(kg K). */
  readonly surfaceKJPerKgK: number;
  /** What the heat of fusion adds per kg of vapour already in the air, kJ/kg. */
  readonly fusionKJPerKg: number;
}

/** Eq. 33 and eq. 35 in the common form L(x) Ws(x) + 1.006 x + c w x = h + fusion w. */
const WATER: WetSurface = { latentKJPerKg: (x) => 2501 - 2.326 * x, surfaceKJPerKgK: 4.186, fusionKJPerKg: 0 };
const ICE: WetSurface = { latentKJPerKg: (x) => 2830 - 0.24 * x, surfaceKJPerKgK: 2.1, fusionKJPerKg: 329 };

/**
 * Thermodynamic wet bulb, °C, of a state; never above the dry bulb.
 * @param dryBulbC dry bulb, °C, -100 to 200
 * @param humidityRatio kg/kg; a ratio over saturation is taken as saturated
 * @param pressurePa station pressure, Pa
 * @throws RangeError when an input is not a finite number
 */
export function wetBulbC(dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  if (!Number.isFinite(dryBulbC + humidityRatio + pressurePa)) {
    throw new RangeError(
      `wet bulb of a state that is not known: ${dryBulbC} °C, ${humidityRatio} kg/kg, ${pressurePa} Pa`,
    );
  }
  if (humidityRatio >= saturationHumidityRatio(dryBulbC, pressurePa)) return dryBulbC;
  const rootC = psychrolib.GetTWetBulbFromHumRatio(dryBulbC, humidityRatio, pressurePa);
  return Math.min(
    Math.abs(rootC) < TWO_ROOTS_WITHIN_K ? settledRootC(rootC, dryBulbC, humidityRatio, pressurePa) : rootC,
    dryBulbC,
  );
}

/** The root that the rule wants: PsychroLib's where it is that one and stands clear of 0 °C, else found here. */
function settledRootC(anyRootC: number, dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  const ratio = Math.max(humidityRatio, DRIEST_HUMIDITY_RATIO);
  const enthalpy = enthalpyKJPerKg(dryBulbC, ratio);
  const water = enthalpy >= LATENT_HEAT_KJ_PER_KG * saturationHumidityRatio(0, pressurePa);
  if (Math.abs(anyRootC) >= NEAR_ZERO_K && anyRootC > 0 === water) return anyRootC;
  const surface = water ? WATER : ICE;
  const target = enthalpy + surface.fusionKJPerKg * ratio;
  let low = water ? 0 : -2 * TWO_ROOTS_WITHIN_K;
  let high = water ? Math.min(dryBulbC, 2 * TWO_ROOTS_WITHIN_K) : 0;
  while (high - low > ROOT_TOLERANCE_K) {
    const middle = (low + high) / 2;
    const heat =
      surface.latentKJPerKg(middle) * saturationHumidityRatio(middle, pressurePa) +
      1.006 * middle +
      surface.surfaceKJPerKgK * ratio * middle;
    if (heat > target) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}
