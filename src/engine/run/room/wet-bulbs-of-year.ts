import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import type { PackedYear } from '../../reduction/weather-year.ts';
import type { HourColumns } from '../hour-columns.ts';

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

/** Wet bulb of the hour at a place in the columns, °C. */
export function wetBulbAt({ wetBulbC: found }: WetBulbs, hours: HourColumns, at: number): number {
  const slot = hours.slot[at] ?? 0;
  const known = found[slot] ?? Number.NaN;
  if (!Number.isNaN(known)) return known;
  found[slot] = wetBulbC(hours.dryBulbC[at] ?? 0, hours.humidityRatio[at] ?? 0, hours.pressurePa[at] ?? 0);
  return found[slot] ?? Number.NaN;
}

/** The same of outdoor air cooled to `betweenC` by an indirect stage at full effect, its moisture kept. */
export function secondWetBulbAt({ secondWetBulbC: found }: WetBulbs, hours: HourColumns, at: number, betweenC: number) {
  const slot = hours.slot[at] ?? 0;
  const known = found[slot] ?? Number.NaN;
  if (!Number.isNaN(known)) return known;
  found[slot] = wetBulbC(betweenC, hours.humidityRatio[at] ?? 0, hours.pressurePa[at] ?? 0);
  return found[slot] ?? Number.NaN;
}
