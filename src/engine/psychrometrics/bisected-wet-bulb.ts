import { saturationPressurePa } from './moist-air.ts';
import { DRY_AIR_KJ_PER_KG_K, type WetSurface } from './wet-surface.ts';

/** The coldest temperature at which the formula of saturation pressure holds, °C. */
const COLDEST_C = -100;
const ROOT_TOLERANCE_K = 1e-6;
const MASS_RATIO = 0.621945;

/**
 * The wet bulb, °C, by bisection on the formulas themselves: for the rare states outside the kernel's tables. Several
 * microseconds; good to 0.000001 K.
 * @param input.highC a temperature that the wet bulb does not pass: the dry bulb, or 0 °C over ice
 * @param input.heatKJPerKg right side of the balance of `wet-surface.ts`
 */
export function bisectedWetBulbC(input: {
  surface: WetSurface;
  highC: number;
  humidityRatio: number;
  pressurePa: number;
  heatKJPerKg: number;
}): number {
  const { surface, humidityRatio, pressurePa, heatKJPerKg } = input;
  let low = COLDEST_C;
  let high = input.highC;
  while (high - low > ROOT_TOLERANCE_K) {
    const middle = (low + high) / 2;
    const saturationPa = saturationPressurePa(middle);
    const latent = surface.latentKJPerKg + surface.latentSlopeKJPerKgK * middle;
    const heat =
      (latent * MASS_RATIO * saturationPa) / (pressurePa - saturationPa) +
      (DRY_AIR_KJ_PER_KG_K + surface.surfaceKJPerKgK * humidityRatio) * middle;
    // Where water boils, no air is left to be that hot and wet: the root lies below.
    if (saturationPa >= pressurePa || heat > heatKJPerKg) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}
