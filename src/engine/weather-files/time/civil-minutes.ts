/** Dates and times as minutes, so that a clock can be moved by adding: proleptic Gregorian calendar, no leap seconds. */

const MINUTES_PER_DAY = 1440;
const DAYS_PER_ERA = 146_097;
const DAYS_TO_1970 = 719_468;

export interface CivilTime {
  year: number;
  month: number;
  day: number;
  hour: number;
  minute: number;
}

/** Days since 1 January 1970 (algorithm of H. Hinnant, days from civil: years begin in March, so leap days come last). */
function daysOf(year: number, month: number, day: number): number {
  const marchYear = month <= 2 ? year - 1 : year;
  const era = Math.floor(marchYear / 400);
  const yearOfEra = marchYear - era * 400;
  const dayOfYear = Math.floor((153 * (month + (month > 2 ? -3 : 9)) + 2) / 5) + day - 1;
  const dayOfEra = yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear;
  return era * DAYS_PER_ERA + dayOfEra - DAYS_TO_1970;
}

/** Minutes from the beginning of 1970 on the same clock. Hour 24 and minute 60 are those of the next day and hour. */
export function civilMinutes(time: CivilTime): number {
  return daysOf(time.year, time.month, time.day) * MINUTES_PER_DAY + time.hour * 60 + time.minute;
}

/** The date and time of so many minutes from the beginning of 1970; hours 0 to 23. */
export function civilTime(minutes: number): CivilTime {
  const days = Math.floor(minutes / MINUTES_PER_DAY);
  const within = minutes - days * MINUTES_PER_DAY;
  const shifted = days + DAYS_TO_1970;
  const era = Math.floor(shifted / DAYS_PER_ERA);
  const dayOfEra = shifted - era * DAYS_PER_ERA;
  const yearOfEra = Math.floor(
    (dayOfEra - Math.floor(dayOfEra / 1460) + Math.floor(dayOfEra / 36_524) - Math.floor(dayOfEra / 146_096)) / 365,
  );
  const dayOfYear = dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const monthFromMarch = Math.floor((5 * dayOfYear + 2) / 153);
  const month = monthFromMarch < 10 ? monthFromMarch + 3 : monthFromMarch - 9;
  return {
    year: yearOfEra + era * 400 + (month <= 2 ? 1 : 0),
    month,
    day: dayOfYear - Math.floor((153 * monthFromMarch + 2) / 5) + 1,
    hour: Math.floor(within / 60),
    minute: within % 60,
  };
}
