import { floatColumn } from '../float-column.ts';
import { saturationHumidityRatio } from '../psychrometrics/moist-air.ts';
import { standardPressurePa } from '../psychrometrics/pressure.ts';
import { packYear, unpackYear } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';

/** Lapse rate of the standard atmosphere, K per m (ASHRAE Fundamentals 2017 ch. 1 eq. 4). */
const LAPSE_K_PER_M = 0.0065;
const HEIGHT_STEP_M = 10;

/** A site's height as an adjustment and the key of its run use it: whole steps of 10 m (method 11). */
export function heightInSteps(elevationM: number): number {
  // Without the addition a height just under the sea would be -0.
  return Math.round(elevationM / HEIGHT_STEP_M) * HEIGHT_STEP_M + 0;
}

/**
 * The weather of a station moved to the height of a site (method 8): t by 6.5 K/km, p by the ratio of the pressures of the
 * standard atmosphere, w kept, but not above saturation. What is missing stays missing; provenance is kept.
 * @param input.toElevationM both heights given by a file or a person; `heightInSteps` where a run is keyed by it
 * @throws RangeError on a height that is no number
 */
export function adjustToHeight<Year extends Pick<WeatherYear, 'packed'>>(input: {
  year: Year;
  fromElevationM: number;
  toElevationM: number;
}): Year {
  const { year, fromElevationM, toElevationM } = input;
  if (!Number.isFinite(fromElevationM + toElevationM)) {
    throw new RangeError(`heights to adjust between are not known: ${fromElevationM} m, ${toElevationM} m`);
  }
  if (fromElevationM === toElevationM) return year;
  const fallK = LAPSE_K_PER_M * (toElevationM - fromElevationM);
  const pressureRatio = standardPressurePa(toElevationM) / standardPressurePa(fromElevationM);
  const before = unpackYear(year.packed);
  const dryBulbC = before.dryBulbC.map((value) => value - fallK);
  const pressurePa = before.pressurePa.map((value) => value * pressureRatio);
  const humidityRatio = floatColumn(dryBulbC.length, (slot) => {
    const ratio = before.humidityRatio[slot] ?? Number.NaN;
    const tempC = dryBulbC[slot] ?? Number.NaN;
    const pressure = pressurePa[slot] ?? Number.NaN;
    if (Number.isNaN(ratio + tempC + pressure)) return ratio;
    return Math.min(ratio, saturationHumidityRatio(tempC, pressure));
  });
  return { ...year, packed: packYear({ dryBulbC, humidityRatio, pressurePa, flags: year.packed.flags }) };
}
