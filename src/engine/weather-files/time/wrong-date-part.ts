import { daysInMonth, isLeapYear, monthNames } from '../../reduction/calendar.ts';
import type { CivilTime } from './civil-minutes.ts';

const YEARS = { first: 1800, last: 2200 } as const;

/** Why a date and time do not exist, as the beginning of a sentence; null when they do. Hour 24 and minute 60 exist. */
export function wrongDatePart(time: CivilTime): string | null {
  const { day, hour, minute, month, year } = time;
  if (!isWhole(year, YEARS.first, YEARS.last)) return outside('year', year, YEARS.first, YEARS.last);
  if (!isWhole(month, 1, 12)) return outside('month', month, 1, 12);
  const days = daysInMonth(month, isLeapYear(year));
  if (!isWhole(day, 1, days)) return outside('day', day, 1, days, ` of ${monthNames[month - 1]} ${year}`);
  if (!isWhole(hour, 0, 24)) return outside('hour', hour, 0, 24);
  return isWhole(minute, 0, 60) ? null : outside('minute', minute, 0, 60);
}

function isWhole(value: number, low: number, high: number): boolean {
  return Number.isInteger(value) && value >= low && value <= high;
}

// Five arguments, since all of them are words of one sentence.
function outside(part: string, value: number, low: number, high: number, of = ''): string {
  if (Number.isNaN(value)) return `its ${part} is no number`;
  return `${part} ${value}${of} does not exist (${low} to ${high})`;
}
