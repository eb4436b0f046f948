/**
 * Conventions of the engine, stated once.
 *
 * Units: °C, Pa, kg of water per kg of dry air, m, hours, K for differences; the unit stands in the name (`dryBulbC`).
 * Slots: a weather year is a calendar of 8760 (8784 with 29 February) slots in local standard time. Slot i, counted from 0,
 * ends at hour i % 24 + 1 of day floor(i / 24) of the year; a state value belongs to the instant at which its slot ends.
 * Missing: a value that is not known is NaN in floating-point columns and the sentinel below in packed ones. Nothing else.
 * Arrays: one column per variable, slot order.
 * Comparisons: made on whole hundredths (`hundredths`), each side rounded first; a tie is met (method: 0.01 K, 0.01 % RH).
 */

/** Raised by any change that can move a result; every stored result names it. */
export const METHOD_VERSION = '2026.2';

/** Raised by any change that can move what is read from the same bytes; part of a run's key. */
export const READ_VERSION = '2026.3';

export const HOURS_PER_DAY = 24;
export const SLOTS_PER_YEAR = 8760;
export const SLOTS_PER_LEAP_YEAR = 8784;

/** Missing values of the packed columns: int16 and uint16. */
export const MISSING_INT16 = -32768;
export const MISSING_UINT16 = 65535;

/** A temperature, difference, relative humidity (%) or index in whole hundredths, the grain of every comparison. */
export function hundredths(value: number): number {
  return Math.round(value * 100);
}
