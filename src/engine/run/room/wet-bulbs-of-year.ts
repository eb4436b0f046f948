import { wetBulbC, wetBulbColumn } from '../../psychrometrics/wet-bulb.ts';
import type { YearColumns } from '../../reduction/packed-columns.ts';
import type { PackedYear } from '../../reduction/weather-year.ts';

/**
 * Wet bulbs of a weather year, °C, NaN where missing. Derived, never stored; kept beside the year while that is in memory, in 32
 * bits (0.000002 K), since a brief that changes leaves them as they are.
 */
export interface WetBulbs {
  readonly wetBulbC: Float32Array;
  /** After an indirect stage at full effect, of the effectiveness asked for. */
  readonly secondWetBulbC: Float32Array;
}

interface Kept {
  readonly wetBulbC: Float32Array;
  effIndirect: number;
  secondWetBulbC: Float32Array;
}

const kept = new WeakMap<PackedYear, Kept>();

/** @param year.weather the packed year's own columns */
export function wetBulbsOfYear(year: { packed: PackedYear; weather: YearColumns }, effIndirect: number): WetBulbs {
  const found = kept.get(year.packed) ?? keep(year);
  if (found.effIndirect !== effIndirect) {
    found.secondWetBulbC = secondColumn(year.weather, found.wetBulbC, effIndirect);
    found.effIndirect = effIndirect;
  }
  return found;
}

function keep({ packed, weather }: { packed: PackedYear; weather: YearColumns }): Kept {
  const wetBulbC = Float32Array.from(wetBulbColumn(weather.dryBulbC, weather.humidityRatio, weather.pressurePa));
  const made = { wetBulbC, effIndirect: Number.NaN, secondWetBulbC: wetBulbC };
  kept.set(packed, made);
  return made;
}

/** The wet bulb of outdoor air cooled by e (t - t_wb), its moisture kept. */
function secondColumn({ dryBulbC, humidityRatio, pressurePa }: YearColumns, wetC: Float32Array, effIndirect: number) {
  const second = new Float32Array(wetC.length).fill(Number.NaN);
  for (let slot = 0; slot < second.length; slot++) {
    const tempC = dryBulbC[slot] ?? Number.NaN;
    const wet = wetC[slot] ?? Number.NaN;
    if (Number.isNaN(wet)) continue;
    const betweenC = tempC - Math.max(0, effIndirect * (tempC - wet));
    second[slot] = wetBulbC(betweenC, humidityRatio[slot] ?? 0, pressurePa[slot] ?? 0);
  }
  return second;
}
