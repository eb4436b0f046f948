import type { CivilTime } from '../time/civil-minutes.ts';
import { wrongDatePart } from '../time/wrong-date-part.ts';
import type { DateOrder } from './table-mapping.ts';

/** A time as it stands in a cell, and the offset from UTC that it carries, min; null where it carries none. */
export interface Stamp {
  readonly time: CivilTime;
  readonly offsetMin: number | null;
}

export interface CivilDate {
  readonly year: number;
  readonly month: number;
  readonly day: number;
}

const CLOCK = String.raw`(\d{1,2}):(\d{2})(?::\d{2}(?:[.,]\d+)?)?\s*([AaPp])?(?:\.?[Mm]\.?)?`;
const ZONE = String.raw`\s*(Z|UTC|GMT|[+-]\d{2}:?\d{2})?`;
const ONE_CLOCK = new RegExp(`^${CLOCK}$`);
const DATE_AND_CLOCK = new RegExp(String.raw`^(.{6,20}?)[T ,:]+\s*${CLOCK}${ZONE}$`, 'i');
const YEAR_FIRST = /^(\d{4})[-/.](\d{1,2})[-/.](\d{1,2})$/;
const NUMBERS = /^(\d{1,2})[-/.](\d{1,2})[-/.](\d{4}|\d{2})$/;
const MONTH_NAME = /^(\d{1,2})[-\s/]([A-Za-z]{3,9})[-\s/,]+(\d{4}|\d{2})$/;
const COMPACT_DATE = /^(\d{4})(\d{2})(\d{2})$/;
const COMPACT = /^(\d{4})(\d{2})(\d{2})[T :_-]?(\d{2})(\d{2})?(?:\d{2})?(Z)?$/;
const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];
/** Two digits: 50 to 99 are of the twentieth century. */
const CENTURY_TURNS_AT = 50;

/** A date and a time in one cell; null when it is none. */
export function readStamp(cell: string, order: DateOrder): Stamp | null {
  const compact = COMPACT.exec(cell);
  if (compact !== null) {
    const [, year, month, day, hour, minute = '0', zulu] = compact;
    const time = timeOf({ year: Number(year), month: Number(month), day: Number(day) }, Number(hour), Number(minute));
    return time === null ? null : { time, offsetMin: zulu === undefined ? null : 0 };
  }
  const parts = DATE_AND_CLOCK.exec(cell);
  if (parts === null) return null;
  const [, dateText = '', hour, minute, half, zone] = parts;
  const date = readDate(dateText.trim(), order);
  const time = date === null ? null : timeOf(date, hourOfDay(Number(hour), half), Number(minute));
  return time === null ? null : { time, offsetMin: zone === undefined ? null : offsetOf(zone) };
}

/** A date alone; null when it is none. */
export function readDate(cell: string, order: DateOrder): CivilDate | null {
  const yearFirst = YEAR_FIRST.exec(cell) ?? COMPACT_DATE.exec(cell);
  if (yearFirst !== null) return existing(Number(yearFirst[1]), Number(yearFirst[2]), Number(yearFirst[3]));
  const named = MONTH_NAME.exec(cell);
  if (named !== null) {
    const month = MONTHS.indexOf((named[2] ?? '').slice(0, 3).toLowerCase()) + 1;
    return existing(fullYear(named[3] ?? ''), month, Number(named[1]));
  }
  const numbers = NUMBERS.exec(cell);
  if (numbers === null) return null;
  const [first, second] = [Number(numbers[1]), Number(numbers[2])];
  const year = fullYear(numbers[3] ?? '');
  return order === 'day first' ? existing(year, second, first) : existing(year, first, second);
}

/** A time of day alone, or a whole hour; null when it is none. */
export function readClock(cell: string): { readonly hour: number; readonly minute: number } | null {
  const clock = ONE_CLOCK.exec(cell);
  const hour =
    clock === null ? Number(/^\d{1,2}$/.exec(cell)?.[0] ?? Number.NaN) : hourOfDay(Number(clock[1]), clock[3]);
  const minute = clock === null ? 0 : Number(clock[2]);
  return hour <= 24 && minute <= 59 && !(hour === 24 && minute > 0) ? { hour, minute } : null;
}

/** First and second number of a date written with numbers and the year last; null for every other form. */
export function numbersOfDate(cell: string): readonly [number, number] | null {
  const numbers = /^(\d{1,2})[-/.](\d{1,2})[-/.](?:\d{4}|\d{2})(?:\D|$)/.exec(cell);
  return numbers === null ? null : [Number(numbers[1]), Number(numbers[2])];
}

function timeOf(date: CivilDate, hour: number, minute: number): CivilTime | null {
  const time = { ...date, hour, minute };
  return wrongDatePart(time) === null && minute < 60 && !(hour === 24 && minute > 0) ? time : null;
}

function existing(year: number, month: number, day: number): CivilDate | null {
  return wrongDatePart({ year, month, day, hour: 0, minute: 0 }) === null ? { year, month, day } : null;
}

function fullYear(digits: string): number {
  const year = Number(digits);
  if (digits.length > 2) return year;
  return year + (year < CENTURY_TURNS_AT ? 2000 : 1900);
}

/** 12-hour clock: 12 AM is midnight, 12 PM noon. */
function hourOfDay(hour: number, half: string | undefined): number {
  if (half === undefined) return hour;
  if (hour < 1 || hour > 12) return Number.NaN;
  return (hour % 12) + (half.toLowerCase() === 'p' ? 12 : 0);
}

function offsetOf(zone: string): number {
  const offset = /^([+-])(\d{2}):?(\d{2})$/.exec(zone);
  if (offset === null) return 0;
  return (offset[1] === '-' ? -1 : 1) * (Number(offset[2]) * 60 + Number(offset[3]));
}
