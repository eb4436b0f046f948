import { HOURS_PER_DAY } from '../conventions.ts';
import { floatColumn } from '../float-column.ts';
import { monthHourOfEachSlot, monthOfEachSlot } from './calendar.ts';

const MONTHS = 12;
const HUNDREDTHS_PER_BIN = 100;
/** Bins of 1 K from 0; the last holds 63 K and more, which no weather reaches. */
export const DEPRESSION_BINS = 64;
/** Depressions for which "hours of at least so many K" are given, 1 to 25 K. */
const HIGHEST_STEP_K = 25;

/**
 * Hours by month, hour of day and 1 K bin of depression: value at ((month - 1) x 24 + hour - 1) x 64 + bin, with month 1 to
 * 12 and hour 1 to 24.
 * @param depression hundredths of a kelvin reached, slot order, -1 where not known
 */
export function depressionHistogram(depression: Int32Array): Uint16Array {
  const cells = monthHourOfEachSlot(depression.length);
  const histogram = new Uint16Array(MONTHS * HOURS_PER_DAY * DEPRESSION_BINS);
  for (let slot = 0; slot < depression.length; slot++) {
    const value = depression[slot] ?? -1;
    if (value < 0) continue;
    const at = (cells[slot] ?? 0) * DEPRESSION_BINS + binOf(value);
    histogram[at] = (histogram[at] ?? 0) + 1;
  }
  return histogram;
}

/**
 * Hours by month and 1 K bin of depression, 768 counts: value at (month - 1) x 64 + bin. This is what the database keeps of each year
 * for lists and filters; a change of the layout or of `DEPRESSION_BINS` needs a migration.
 * @param depression hundredths of a kelvin reached, slot order, -1 where not known
 */
export function depressionHoursByMonth(depression: Int32Array): Uint16Array {
  const months = monthOfEachSlot(depression.length);
  const byMonth = new Uint16Array(MONTHS * DEPRESSION_BINS);
  for (let slot = 0; slot < depression.length; slot++) {
    const value = depression[slot] ?? -1;
    if (value < 0) continue;
    const at = ((months[slot] ?? 1) - 1) * DEPRESSION_BINS + binOf(value);
    byMonth[at] = (byMonth[at] ?? 0) + 1;
  }
  return byMonth;
}

function binOf(depression: number): number {
  const bin = (depression / HUNDREDTHS_PER_BIN) | 0;
  return bin < DEPRESSION_BINS ? bin : DEPRESSION_BINS - 1;
}

export interface HoursAtLeast {
  readonly atLeastK: number;
  /** As read: over the hours that are known. */
  readonly hours: number;
  /** Scaled to every hour of the year by month x hour of day; null when some month lacks an hour of day altogether. */
  readonly scaledHours: number | null;
}

/**
 * Hours with a depression of at least 1, 2, .. 25 K.
 * @param depression hundredths of a kelvin reached, slot order, -1 where not known
 * @param byMonth the same by month and bin, where it is at hand
 */
export function hoursAtLeast(
  depression: Int32Array,
  byMonth = depressionHoursByMonth(depression),
): readonly HoursAtLeast[] {
  const hours = countAtLeast(byMonth);
  const scaled = depression.includes(-1) ? scaledAtLeast(depression) : hours;
  return Array.from({ length: HIGHEST_STEP_K }, (_none, index) => ({
    atLeastK: index + 1,
    hours: hours[index + 1] ?? 0,
    scaledHours: scaled === null ? null : (scaled[index + 1] ?? 0),
  }));
}

function countAtLeast(byMonth: Uint16Array): Int32Array {
  const hours = new Int32Array(DEPRESSION_BINS + 1);
  for (let bin = DEPRESSION_BINS - 1; bin >= 0; bin--) {
    let count = hours[bin + 1] ?? 0;
    for (let at = bin; at < byMonth.length; at += DEPRESSION_BINS) count += byMonth[at] ?? 0;
    hours[bin] = count;
  }
  return hours;
}

/** The same with each hour counted as what it stands for; null when nothing can stand for some. */
function scaledAtLeast(depression: Int32Array): Float64Array | null {
  const scale = cellScale(depression);
  if (scale === null) return null;
  const cells = monthHourOfEachSlot(depression.length);
  const scaled = new Float64Array(HIGHEST_STEP_K + 1);
  for (let slot = 0; slot < depression.length; slot++) {
    const value = depression[slot] ?? -1;
    const weight = scale[cells[slot] ?? 0] ?? 0;
    const most = value < 0 ? -1 : Math.min(HIGHEST_STEP_K, binOf(value));
    for (let step = 1; step <= most; step++) scaled[step] = (scaled[step] ?? 0) + weight;
  }
  return scaled;
}

/**
 * What each known hour stands for, by month and hour of day: the hours of the cell over those that are known. A file that lacks
 * only nights must not look hotter or drier. Null when some cell is wholly unknown and nothing can stand for it.
 */
function cellScale(depression: Int32Array): Float64Array | null {
  const cells = monthHourOfEachSlot(depression.length);
  const all = new Float64Array(MONTHS * HOURS_PER_DAY);
  const known = new Float64Array(MONTHS * HOURS_PER_DAY);
  for (let slot = 0; slot < depression.length; slot++) {
    const cell = cells[slot] ?? 0;
    all[cell] = (all[cell] ?? 0) + 1;
    if ((depression[slot] ?? -1) >= 0) known[cell] = (known[cell] ?? 0) + 1;
  }
  if (known.includes(0)) return null;
  return floatColumn(all.length, (cell) => (all[cell] ?? 0) / (known[cell] ?? 1));
}
