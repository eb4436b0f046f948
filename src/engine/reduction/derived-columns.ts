/** Columns that follow from the packed ones: derived when they are needed, never a stored fact. */
import { wetBulbColumn as wetBulbOfColumns } from '../psychrometrics/wet-bulb.ts';
import { unpackYear } from './packed-columns.ts';
import type { PackedYear } from './weather-year.ts';

/** Wet bulb, °C, of every slot; NaN where dry bulb, humidity or pressure is missing. */
export function wetBulbColumn(year: PackedYear): Float64Array {
  const { dryBulbC, humidityRatio, pressurePa } = unpackYear(year);
  return wetBulbOfColumns(dryBulbC, humidityRatio, pressurePa);
}

/** Wet-bulb depression, K, of every slot: dry bulb less wet bulb, both in °C, 0 when saturated; NaN where it is not known. */
export function depressionColumn(dryBulbC: Float64Array, wetBulbC: Float64Array): Float64Array {
  const column = new Float64Array(wetBulbC.length);
  for (let slot = 0; slot < column.length; slot++) {
    column[slot] = (dryBulbC[slot] ?? Number.NaN) - (wetBulbC[slot] ?? Number.NaN);
  }
  return column;
}

/** The wet bulb is found to this, in hundredths of a kelvin: so close to a limit is a tie, and a tie is met. */
const TIE_HUNDREDTHS = 0.05;

/**
 * Depression of every slot in the whole hundredths of a kelvin that it reaches, -1 where it is not known. Rounded down, since
 * depression hours count the hours that reach so many kelvin: rounded to the nearest, every count would be too high by the
 * hours that lack up to 0.005 K (measured on real years: up to 8).
 * @param depressionK depression, K, in slot order, NaN where not known
 */
export function reachedHundredths(depressionK: Float64Array): Int32Array {
  const reached = new Int32Array(depressionK.length);
  for (let slot = 0; slot < reached.length; slot++) {
    const value = 100 * (depressionK[slot] ?? Number.NaN) + TIE_HUNDREDTHS;
    reached[slot] = value >= 0 ? value | 0 : Number.isNaN(value) ? -1 : 0;
  }
  return reached;
}
