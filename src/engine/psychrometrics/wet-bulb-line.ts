import { saturationHumidityRatio } from './moist-air.ts';

/**
 * Humidity ratio, kg/kg, of the state with this dry bulb on a line of constant thermodynamic wet bulb: what a wetted
 * medium supplies. ASHRAE Fundamentals 2017 ch. 1 eq. 33 (water, from 0 °C on) and eq. 35 (ice).
 * @param dryBulbC °C, at least the wet bulb
 * @param wetBulbC °C
 * @param pressurePa station pressure, Pa
 */
export function humidityRatioOnWetBulbLine(dryBulbC: number, wetBulbC: number, pressurePa: number): number {
  return ratioOnWetBulbLine(saturationHumidityRatio(wetBulbC, pressurePa), dryBulbC, wetBulbC);
}

/** The same with the humidity ratio of saturation at the wet bulb at hand, kg/kg. */
export function ratioOnWetBulbLine(saturated: number, dryBulbC: number, wetBulbC: number): number {
  const drop = 1.006 * (dryBulbC - wetBulbC);
  const ratio =
    wetBulbC >= 0
      ? ((2501 - 2.326 * wetBulbC) * saturated - drop) / (2501 + 1.86 * dryBulbC - 4.186 * wetBulbC)
      : ((2830 - 0.24 * wetBulbC) * saturated - drop) / (2830 + 1.86 * dryBulbC - 2.1 * wetBulbC);
  return Math.max(ratio, 0);
}
