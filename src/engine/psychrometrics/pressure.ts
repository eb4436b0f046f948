import { psychrolib } from './psychrolib-si.ts';

/** Kelvin per metre of the standard atmosphere (ASHRAE Fundamentals 2017 ch. 1 eq. 4). */
const LAPSE_K_PER_M = 0.0065;
const ZERO_CELSIUS_K = 273.15;
const SEA_LEVEL_EXPONENT = 5.2559;
const STANDARD_SEA_LEVEL_K = 288.15;

/**
 * Pressure of the standard atmosphere, Pa, at an elevation, m (negative below sea level).
 * ASHRAE Fundamentals 2017 ch. 1 eq. 3, -5,000 to 11,000 m.
 */
export function standardPressurePa(elevationM: number): number {
  return psychrolib.GetStandardAtmPressure(elevationM);
}

/**
 * Station pressure, Pa, from sea-level pressure, Pa: p = SLP (Tk / (Tk + 0.0065 z))^5.2559.
 * @param input.dryBulbC dry bulb at the station, °C
 * @param input.elevationM elevation of the station, m
 */
export function stationPressurePa(input: { seaLevelPressurePa: number; dryBulbC: number; elevationM: number }): number {
  const dryBulbK = input.dryBulbC + ZERO_CELSIUS_K;
  return input.seaLevelPressurePa * (dryBulbK / (dryBulbK + LAPSE_K_PER_M * input.elevationM)) ** SEA_LEVEL_EXPONENT;
}

/**
 * Station pressure, Pa, from an altimeter setting (QNH), Pa: the setting is the pressure at sea level of a standard atmosphere
 * that has the station's pressure at its elevation, so (QNH / p0)^a - (p / p0)^a = L z / T0 with a = 1 / 5.2559.
 */
export function stationPressureOfAltimeterPa(altimeterPa: number, elevationM: number): number {
  const standardPa = standardPressurePa(0);
  const drop = (LAPSE_K_PER_M * elevationM) / STANDARD_SEA_LEVEL_K;
  return standardPa * ((altimeterPa / standardPa) ** (1 / SEA_LEVEL_EXPONENT) - drop) ** SEA_LEVEL_EXPONENT;
}
