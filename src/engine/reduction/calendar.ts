/**
 * The calendar of a weather year: 8760 slots, or 8784 with 29 February; see `conventions.ts` for what a slot is.
 * Months and days are counted from 1; the hour of a slot is the hour that ends: 1 to 24.
 */
import { HOURS_PER_DAY, SLOTS_PER_LEAP_YEAR, SLOTS_PER_YEAR } from '../conventions.ts';

const MONTHS = 12;
const DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

export const monthNames = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
] as const;

export interface SlotDate {
  readonly month: number;
  readonly day: number;
  readonly hour: number;
}

/** Whether a calendar of so many slots holds 29 February. @throws RangeError unless there are 8760 or 8784 slots */
export function hasLeapDay(slotCount: number): boolean {
  if (slotCount === SLOTS_PER_YEAR) return false;
  if (slotCount === SLOTS_PER_LEAP_YEAR) return true;
  throw new RangeError(`a weather year has ${SLOTS_PER_YEAR} or ${SLOTS_PER_LEAP_YEAR} slots, not ${slotCount}`);
}

export function isLeapYear(year: number): boolean {
  return (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
}

/** Days of a month, 0 for a month that does not exist. */
export function daysInMonth(month: number, leap: boolean): number {
  return month === 2 && leap ? 29 : (DAYS[month - 1] ?? 0);
}

/** First slot of each month and, last, the number of slots: 13 values. */
export function monthStartSlots(slotCount: number): readonly number[] {
  return hasLeapDay(slotCount) ? startsWithLeapDay : startsWithout;
}

const startsWithout = makeStarts(false);
const startsWithLeapDay = makeStarts(true);

function makeStarts(leap: boolean): readonly number[] {
  const starts = [0];
  for (let month = 1; month <= MONTHS; month++) {
    starts.push((starts[month - 1] ?? 0) + daysInMonth(month, leap) * HOURS_PER_DAY);
  }
  return starts;
}

const monthsOfYears = new Map<number, Uint8Array>();

/** Month, 1 to 12, of every slot. There are two such columns, each made once: they are read only. */
export function monthOfEachSlot(slotCount: number): Uint8Array {
  const made = monthsOfYears.get(slotCount) ?? makeMonths(slotCount);
  monthsOfYears.set(slotCount, made);
  return made;
}

function makeMonths(slotCount: number): Uint8Array {
  const starts = monthStartSlots(slotCount);
  const months = new Uint8Array(slotCount);
  for (let month = 1; month <= MONTHS; month++) months.fill(month, starts[month - 1], starts[month]);
  return months;
}

const cellsOfYears = new Map<number, Uint16Array>();

/** Month and hour of day of every slot as one number, (month - 1) x 24 + hour - 1. Made once, as the months are. */
export function monthHourOfEachSlot(slotCount: number): Uint16Array {
  const made =
    cellsOfYears.get(slotCount) ??
    Uint16Array.from(monthOfEachSlot(slotCount), (month, slot) => (month - 1) * HOURS_PER_DAY + (slot % HOURS_PER_DAY));
  cellsOfYears.set(slotCount, made);
  return made;
}

/** The date on which a slot ends; hour 24 belongs to the day that it closes. */
export function slotDate(slot: number, slotCount: number): SlotDate {
  const starts = monthStartSlots(slotCount);
  const month = starts.findIndex((start, index) => index > 0 && slot < start);
  const first = starts[month - 1];
  if (first === undefined || slot < 0) throw new RangeError(`slot ${slot} is not in a year of ${slotCount} slots`);
  const within = slot - first;
  return { month, day: Math.floor(within / HOURS_PER_DAY) + 1, hour: (within % HOURS_PER_DAY) + 1 };
}

/** The slot of a date, or null when the calendar has no such hour. */
export function slotOf(date: SlotDate, slotCount: number): number | null {
  const start = monthStartSlots(slotCount)[date.month - 1];
  const whole = Number.isInteger(date.month) && Number.isInteger(date.day) && Number.isInteger(date.hour);
  if (!whole || start === undefined || date.day < 1 || date.day > daysInMonth(date.month, hasLeapDay(slotCount))) {
    return null;
  }
  if (date.hour < 1 || date.hour > HOURS_PER_DAY) return null;
  return start + (date.day - 1) * HOURS_PER_DAY + date.hour - 1;
}

/** Day of the week, 0 Sunday to 6 Saturday, of a Gregorian date (congruence of T. Sakamoto). */
export function dayOfWeek(year: number, month: number, day: number): number {
  const offset = [0, 3, 2, 5, 0, 3, 5, 1, 4, 6, 2, 4][month - 1] ?? 0;
  const y = month < 3 ? year - 1 : year;
  return (y + Math.floor(y / 4) - Math.floor(y / 100) + Math.floor(y / 400) + offset + day) % 7;
}
