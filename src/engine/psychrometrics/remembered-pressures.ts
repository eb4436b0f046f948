/** The range of the formulas of saturation pressure, °C, and the number of places per kelvin. */
const COLDEST_C = -100;
const WARMEST_C = 200;
const PLACES_PER_K = 100;

/**
 * A formula of saturation pressure that remembers, for each hundredth of a kelvin, the last temperature asked there and its
 * pressure. The same bits as the formula's own, since a pressure is given again for the very same temperature only: weather files
 * hold tenths, so that a year asks for a few hundred temperatures some ten thousand times.
 * @param formula pressure, Pa, of a temperature, °C
 */
export function rememberedPressures(formula: (tempC: number) => number): (tempC: number) => number {
  // Temperature and pressure side by side, so that one look fetches both.
  const remembered = new Float64Array(2 * ((WARMEST_C - COLDEST_C) * PLACES_PER_K + 1)).fill(Number.NaN);
  const ask = (tempC: number, place: number) => {
    const pressurePa = formula(tempC);
    remembered[place] = tempC;
    remembered[place + 1] = pressurePa;
    return pressurePa;
  };
  return (tempC) => {
    const place = 2 * (((tempC - COLDEST_C) * PLACES_PER_K + 0.5) | 0);
    return remembered[place] === tempC ? (remembered[place + 1] ?? 0) : ask(tempC, place);
  };
}
