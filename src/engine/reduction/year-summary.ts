/** Counts and means of a weather year, from its packed columns. */
import { MISSING_INT16, MISSING_UINT16 } from '../conventions.ts';
import { monthStartSlots } from './calendar.ts';
import { dryBulbProvenance, hasRepair, humidityProvenance, pressureProvenance } from './hour-flags.ts';
import { countValues, valuesDownwards } from './value-counts.ts';
import type { PackedYear } from './weather-year.ts';

const MONTHS = 12;

export interface HourCounts {
  /** All slots: measured + estimated + repaired + missing. */
  readonly hours: number;
  readonly measured: number;
  /** Dry bulb or humidity interpolated or modelled by the source. */
  readonly estimated: number;
  /** Any value changed or filled by a rule of ours. */
  readonly repaired: number;
  /** Dry bulb, humidity or pressure not known. */
  readonly missing: number;
  /** Known hours whose pressure is assumed. */
  readonly assumedPressure: number;
}

/** Counts every slot once: missing before repaired before estimated before measured. */
export function countHours(year: PackedYear): HourCounts {
  const counts = { hours: year.flags.length, measured: 0, estimated: 0, repaired: 0, missing: 0, assumedPressure: 0 };
  const complete = isComplete(year);
  for (let slot = 0; slot < year.flags.length; slot++) {
    if (!complete && !isKnown(year, slot)) {
      counts.missing++;
      continue;
    }
    const flags = year.flags[slot] ?? 0;
    // As in nearly every hour, all three are measured, whose code is 0.
    if (flags === 0) {
      counts.measured++;
      continue;
    }
    if (pressureProvenance(flags) === 'estimated') counts.assumedPressure++;
    if (hasRepair(flags)) counts.repaired++;
    else if (dryBulbProvenance(flags) === 'estimated' || humidityProvenance(flags) === 'estimated') counts.estimated++;
    else counts.measured++;
  }
  return counts;
}

/** Whether every hour is known. The search of the language looks at many values together. */
function isComplete({ dryBulb, humidityRatio, pressure }: PackedYear): boolean {
  return (
    !dryBulb.includes(MISSING_INT16) && !humidityRatio.includes(MISSING_UINT16) && !pressure.includes(MISSING_UINT16)
  );
}

function isKnown(year: PackedYear, slot: number): boolean {
  return (
    year.dryBulb[slot] !== MISSING_INT16 &&
    year.humidityRatio[slot] !== MISSING_UINT16 &&
    year.pressure[slot] !== MISSING_UINT16
  );
}

/** Share of hours with dry bulb, humidity and pressure, %, January first. */
export function monthCompleteness(year: PackedYear): readonly number[] {
  if (isComplete(year)) return new Array<number>(MONTHS).fill(100);
  const starts = monthStartSlots(year.flags.length);
  return Array.from({ length: MONTHS }, (_none, index) => {
    const start = starts[index] ?? 0;
    const end = starts[index + 1] ?? 0;
    let known = 0;
    for (let slot = start; slot < end; slot++) if (isKnown(year, slot)) known++;
    return (100 * known) / (end - start);
  });
}

/** The highest of the known values of a column, or null without any. */
export function highestOf(column: Float64Array): number | null {
  let highest = Number.NEGATIVE_INFINITY;
  for (let slot = 0; slot < column.length; slot++) {
    const value = column[slot] ?? Number.NaN;
    if (value > highest) highest = value;
  }
  return highest === Number.NEGATIVE_INFINITY ? null : highest;
}

/**
 * Cumulative curve of the depression: the value, K, reached or passed in 0, 1, .. 100 % of the known hours (place
 * floor(percent x (N - 1) / 100) downwards); empty when no hour is known.
 * @param depression hundredths of a kelvin reached, slot order, -1 where not known
 */
export function depressionCurve(depression: Int32Array): readonly number[] {
  const values = countValues(depression, 0);
  if (values.known === 0) return [];
  const places = Array.from({ length: 101 }, (_none, percent) => Math.floor((percent * (values.known - 1)) / 100));
  return valuesDownwards(values, places).map((value) => value / 100);
}
