/** Values of a data record without the codes that stand for a missing one, which become NaN. */

/** A temperature, °C. Codes: 99.9 and above, -99, -99.9, -999, -9999. */
export function temperatureWithoutCodes(value: number): number {
  if (value > -99 && value < 99.9) return value;
  const code = value >= 99.9 || value === -99 || value === -99.9 || value === -999 || value === -9999;
  return code ? Number.NaN : value;
}

/** A relative humidity, %. Codes: 999 and above, and what lies below 0. */
export function humidityWithoutCodes(value: number): number {
  return value >= 999 || value < 0 ? Number.NaN : value;
}

/** A pressure, Pa. 99999 may be a pressure: the median of the file decides, in `read-epw.ts`. */
export function pressureWithoutCodes(value: number): number {
  return value >= 999_999 || value === 9_999 || value <= 0 ? Number.NaN : value;
}
