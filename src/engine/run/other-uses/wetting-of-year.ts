import { saturationHumidityRatio } from '../../psychrometrics/moist-air.ts';
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import type { PackedYear } from '../../reduction/weather-year.ts';

/**
 * What water can do in a weather year, by slot: wet bulbs, °C, and the humidity ratio of air that is saturated there, kg/kg; each computed
 * when it is first asked for, NaN before. Derived, never stored, to the last bit what the formulas give; kept beside the year while that
 * is in memory, since no brief moves them.
 */
export interface Wetting {
  readonly wetBulbC: Float64Array;
  /** Of no length until a use asks for it. */
  saturatedRatio: Float64Array;
}

const kept = new WeakMap<PackedYear, Wetting>();
const none = (slots: number) => new Float64Array(slots).fill(Number.NaN);

export function wettingOfYear(year: PackedYear): Wetting {
  const found = kept.get(year) ?? { wetBulbC: none(year.dryBulb.length), saturatedRatio: new Float64Array(0) };
  kept.set(year, found);
  return found;
}

/** The same with the humidity ratios of saturation. */
export function fullWettingOfYear(year: PackedYear): Wetting {
  const wetting = wettingOfYear(year);
  if (wetting.saturatedRatio.length === 0) wetting.saturatedRatio = none(year.dryBulb.length);
  return wetting;
}

/** Computes the wet bulb of a slot and keeps it; answers nothing, as `findWetBulb` of rooms. */
export function findWetBulb(
  { wetBulbC: kept }: Wetting,
  slot: number,
  tempC: number,
  ratio: number,
  pressurePa: number,
): void {
  kept[slot] = wetBulbC(tempC, ratio, pressurePa);
}

/** The same of saturation at the wet bulb, which is there. */
export function findSaturated({ wetBulbC: wetBulbs, saturatedRatio }: Wetting, slot: number, pressurePa: number): void {
  saturatedRatio[slot] = saturationHumidityRatio(wetBulbs[slot] ?? Number.NaN, pressurePa);
}
