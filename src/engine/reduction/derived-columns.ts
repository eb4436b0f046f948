/** Columns that follow from the packed ones: derived when they are needed, never a stored fact. */
import { hundredths } from '../conventions.ts';
import { floatColumn } from '../float-column.ts';
import { dewPointC } from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { unpackYear, type YearColumns } from './packed-columns.ts';
import type { PackedYear } from './weather-year.ts';

/** Wet bulb, °C, of every slot; NaN where dry bulb, humidity or pressure is missing. */
export function wetBulbColumn(year: PackedYear): Float64Array {
  return ofEachState(unpackYear(year), wetBulbC);
}

/** Dew point, °C (frost point below 0 °C), of every slot; NaN where something is missing. */
export function dewPointColumn(year: PackedYear): Float64Array {
  return ofEachState(unpackYear(year), dewPointC);
}

function ofEachState(
  columns: YearColumns,
  property: (dryBulbC: number, humidityRatio: number, pressurePa: number) => number,
): Float64Array {
  return floatColumn(columns.dryBulbC.length, (slot) => {
    const dryBulbC = columns.dryBulbC[slot] ?? Number.NaN;
    const humidityRatio = columns.humidityRatio[slot] ?? Number.NaN;
    const pressurePa = columns.pressurePa[slot] ?? Number.NaN;
    if (Number.isNaN(dryBulbC + humidityRatio + pressurePa)) return Number.NaN;
    return property(dryBulbC, humidityRatio, pressurePa);
  });
}

/**
 * Wet-bulb depression of every slot in whole hundredths of a kelvin: dry bulb less wet bulb, each rounded first; 0 when
 * saturated, never negative, -1 where it is not known.
 * @param wetBulb wet bulb, °C, of every slot, NaN where missing
 */
export function depressionHundredths(year: PackedYear, wetBulb: Float64Array): Int32Array {
  return Int32Array.from(wetBulb, (value, slot) =>
    Number.isNaN(value) ? -1 : Math.max(0, (year.dryBulb[slot] ?? 0) - hundredths(value)),
  );
}
