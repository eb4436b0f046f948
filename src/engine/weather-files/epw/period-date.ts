import { daysInMonth, monthNames } from '../../reduction/calendar.ts';

const SHORT_NAMES = monthNames.map((name) => name.slice(0, 3).toLowerCase());

/**
 * A date of a header record, without its year: `m/d`, `m/d/y`, `d Month`, `Month d`, `1-Jan` (as spreadsheets write it) or a
 * day number of the year; months may be cut to three letters. Null for anything else.
 */
export function readPeriodDate(text: string, leap: boolean): { month: number; day: number } | null {
  const numbers = /^\s*(\d{1,2})\s*\/\s*(\d{1,2})\s*(?:\/\s*\d{2,4}\s*)?$/.exec(text);
  if (numbers) return existing(Number(numbers[1]), Number(numbers[2]));
  const dayFirst = /^\s*(\d{1,2})[\s-]+([a-z]{3,})\.?(?:[\s-]+\d{2,4})?\s*$/i.exec(text);
  if (dayFirst) return existing(monthNumber(dayFirst[2] ?? ''), Number(dayFirst[1]));
  const monthFirst = /^\s*([a-z]{3,})\.?[\s-]+(\d{1,2})\s*$/i.exec(text);
  if (monthFirst) return existing(monthNumber(monthFirst[1] ?? ''), Number(monthFirst[2]));
  return /^\s*\d{1,3}\s*$/.test(text) ? dateOfDayNumber(Number(text), leap) : null;
}

function monthNumber(word: string): number {
  return SHORT_NAMES.indexOf(word.slice(0, 3).toLowerCase()) + 1;
}

function existing(month: number, day: number): { month: number; day: number } | null {
  return day >= 1 && day <= daysInMonth(month, true) ? { month, day } : null;
}

function dateOfDayNumber(dayOfYear: number, leap: boolean): { month: number; day: number } | null {
  let day = dayOfYear;
  for (let month = 1; month <= 12; month++) {
    const days = daysInMonth(month, leap);
    if (day >= 1 && day <= days) return { month, day };
    day -= days;
  }
  return null;
}
