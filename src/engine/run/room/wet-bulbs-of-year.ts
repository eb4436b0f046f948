import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import type { PackedYear } from '../../reduction/weather-year.ts';

/**
 * Wet bulbs of a weather year by slot, °C: each computed when it is first asked for, NaN before. Derived, never stored; kept beside
 * the year while that is in memory, in 32 bits (0.000002 K), since a brief that changes leaves them as they are.
 */
export interface WetBulbs {
  readonly wetBulbC: Float32Array;
  /** After an indirect stage at full effect, of this effectiveness. */
  readonly secondWetBulbC: Float32Array;
  effIndirect: number;
}

const kept = new WeakMap<PackedYear, WetBulbs>();

export function wetBulbsOfYear(year: PackedYear, effIndirect: number): WetBulbs {
  const found = kept.get(year) ?? noneYet(year.dryBulb.length);
  kept.set(year, found);
  if (found.effIndirect !== effIndirect) {
    found.secondWetBulbC.fill(Number.NaN);
    found.effIndirect = effIndirect;
  }
  return found;
}

function noneYet(slots: number): WetBulbs {
  const none = () => new Float32Array(slots).fill(Number.NaN);
  return { wetBulbC: none(), secondWetBulbC: none(), effIndirect: Number.NaN };
}

/**
 * Computes the wet bulb of a slot, °C, and keeps it. It answers nothing, so that whoever asks reads it where all others stand: a number
 * that might come from a call would be put into an object at every hour.
 */
export function findWetBulb(
  { wetBulbC: kept }: WetBulbs,
  slot: number,
  tempC: number,
  ratio: number,
  pressurePa: number,
): void {
  kept[slot] = wetBulbC(tempC, ratio, pressurePa);
}

/** The same of its air cooled to `betweenC` by an indirect stage at full effect, its moisture kept. */
export function findSecondWetBulb(
  { secondWetBulbC: kept }: WetBulbs,
  slot: number,
  betweenC: number,
  ratio: number,
  pressurePa: number,
): void {
  kept[slot] = wetBulbC(betweenC, ratio, pressurePa);
}
