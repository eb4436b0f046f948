/** Moist air for the oracle: PsychroLib alone, with the one rule for the wet bulb near 0 °C. Slow and plain. */
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';

/** Both roots can exist this close to 0 °C; PsychroLib returns either. */
const NEAR_ZERO_K = 2;

/** Wet bulb, °C: the water root when h >= 2501 Ws(0 °C, p), else the ice root. */
export function wetBulbC(dryBulbC: number, ratio: number, pressurePa: number): number {
  if (ratio >= psychrolib.GetSatHumRatio(dryBulbC, pressurePa)) return dryBulbC;
  const theirs = psychrolib.GetTWetBulbFromHumRatio(dryBulbC, ratio, pressurePa);
  if (Math.abs(theirs) > NEAR_ZERO_K) return theirs;
  const enthalpy = psychrolib.GetMoistAirEnthalpy(dryBulbC, ratio) / 1000;
  const water = enthalpy >= 2501 * psychrolib.GetSatHumRatio(0, pressurePa);
  let low = water ? 0 : -2 * NEAR_ZERO_K;
  let high = water ? dryBulbC : Math.min(dryBulbC, -1e-9);
  for (let step = 0; step < 40; step++) {
    const middle = (low + high) / 2;
    if (psychrolib.GetHumRatioFromTWetBulb(dryBulbC, middle, pressurePa) > ratio) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}

/** Humidity ratio of the state at a dry bulb on the line of a wet bulb. */
export function ratioOnLine(dryBulbC: number, wetC: number, pressurePa: number): number {
  return psychrolib.GetHumRatioFromTWetBulb(Math.max(dryBulbC, wetC), wetC, pressurePa);
}

export function rhPct(dryBulbC: number, ratio: number, pressurePa: number): number {
  return 100 * psychrolib.GetRelHumFromHumRatio(dryBulbC, ratio, pressurePa);
}

/** Dew point, °C, without a look at the dry bulb: bisection on saturation. */
export function dewPointC(ratio: number, pressurePa: number): number {
  let low = -90;
  let high = 80;
  for (let step = 0; step < 40; step++) {
    const middle = (low + high) / 2;
    if (psychrolib.GetSatHumRatio(middle, pressurePa) > ratio) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}

export function volume(dryBulbC: number, ratio: number, pressurePa: number): number {
  return psychrolib.GetMoistAirVolume(dryBulbC, ratio, pressurePa);
}
