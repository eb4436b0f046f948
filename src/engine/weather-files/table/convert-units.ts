import type { HumidityUnit, PressureUnit, TemperatureUnit } from './table-mapping.ts';

const ZERO_CELSIUS_K = 273.15;
const PA_PER_UNIT: Record<PressureUnit, number> = {
  Pa: 1,
  hPa: 100,
  kPa: 1000,
  // Conventional inch and millimetre of mercury at 0 °C.
  inHg: 3386.389,
  mmHg: 133.322,
};

/** A temperature in °C. */
export function celsius(value: number, unit: TemperatureUnit): number {
  if (unit === 'F') return ((value - 32) * 5) / 9;
  return unit === 'K' ? value - ZERO_CELSIUS_K : value;
}

/** A relative humidity in %. */
export function percent(value: number, unit: HumidityUnit): number {
  return unit === 'fraction' ? value * 100 : value;
}

/** A pressure in Pa. */
export function pascals(value: number, unit: PressureUnit): number {
  return value * PA_PER_UNIT[unit];
}
