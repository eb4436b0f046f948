/**
 * Thermodynamic wet bulb: the one function that everything calls. PsychroLib inside (ASHRAE Fundamentals 2017 ch. 1
 * eq. 33 and 35, bisection to 0.001 K), with one rule of ours near 0 °C, where both an ice and a water wet bulb satisfy the
 * equations and PsychroLib returns either: the water root whenever h >= 2501 Ws(0 °C, p), else the ice root.
 */
import { enthalpyKJPerKg, saturationHumidityRatio } from './moist-air.ts';
import { psychrolib } from './psychrolib-si.ts';

/** Within this distance of 0 °C the root is settled by our rule; the two roots are never further than 0.94 K apart. */
const NEAR_ZERO_K = 1;
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
  const anyRootC = psychrolib.GetTWetBulbFromHumRatio(dryBulbC, humidityRatio, pressurePa);
  const rootC = Math.abs(anyRootC) < NEAR_ZERO_K ? rootNearZeroC(dryBulbC, humidityRatio, pressurePa) : anyRootC;
  return Math.min(rootC, dryBulbC);
}

function rootNearZeroC(dryBulbC: number, humidityRatio: number, pressurePa: number): number {
  const ratio = Math.max(humidityRatio, DRIEST_HUMIDITY_RATIO);
  const enthalpy = enthalpyKJPerKg(dryBulbC, ratio);
  const water = enthalpy >= LATENT_HEAT_KJ_PER_KG * saturationHumidityRatio(0, pressurePa);
  const surface = water ? WATER : ICE;
  const target = enthalpy + surface.fusionKJPerKg * ratio;
  let low = water ? 0 : -2 * NEAR_ZERO_K;
  let high = water ? Math.min(dryBulbC, 2 * NEAR_ZERO_K) : 0;
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
