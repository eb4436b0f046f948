import { saturationPressureOverWaterPa, vapourPressurePa } from './moist-air.ts';
import { humidityRatioOnWetBulbLine } from './wet-bulb-line.ts';

/** A wet bulb so much above the dry bulb is rounding. */
const ROUNDING_K = 0.5;

/** Relative humidity, % over water at any temperature, of a dry bulb and a thermodynamic wet bulb; NaN when they do not go together. */
export function relativeHumidityOfWetBulbPct(dryBulbC: number, wetBulbC: number, pressurePa: number): number {
  if (Number.isNaN(dryBulbC + wetBulbC + pressurePa) || wetBulbC - dryBulbC > ROUNDING_K) return Number.NaN;
  const ratio = humidityRatioOnWetBulbLine(dryBulbC, Math.min(wetBulbC, dryBulbC), pressurePa);
  return (100 * vapourPressurePa(ratio, pressurePa)) / saturationPressureOverWaterPa(dryBulbC);
}
