/** Values that come again day after day: at the same hour, or whole days. */
import { MISSING_INT16 } from '../../conventions.ts';
import { hasLeapDay } from '../../reduction/calendar.ts';
import type { FindingList } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, leaveOut, type StepSpan, type TestedColumn, type TestedHours } from './tested-hours.ts';

/** Successive days with the same value at the same hour, by resolution, 0.01 K (HadISD). */
const SAME_HOUR_DAYS = { 100: 25, 50: 20, 10: 15 } as const;
/** Successive days that are the same in every hour (HadISD). */
const WHOLE_DAYS = {
  'dry bulb': { 100: 10, 50: 7, 10: 5 },
  'dew point': { 100: 10, 50: 7, 10: 2 },
} as const;

/** 29 February is the 60th day. */
const LEAP_DAY = 60;

/** Whole days that repeat the day before, and then the same value at the same hour of many days: all of them are left out. */
export function stuckDays(hours: TestedHours, findings: FindingList): void {
  for (const column of [hours.dryBulb, hours.dewPoint]) {
    for (const span of hours.unbroken) {
      repeatedDays(hours, column, span, findings);
      sameHours(hours, column, span, findings);
    }
  }
}

// Four arguments, here and below: the year, the column, the stretch and the list belong to one pass.
function repeatedDays(hours: TestedHours, column: TestedColumn, span: StepSpan, findings: FindingList): void {
  const perDay = hours.stepsPerDay;
  const fewest = WHOLE_DAYS[column.variable][column.resolution.usual];
  const leapDayEnd = hasLeapDay(hours.steps.slotCount) ? LEAP_DAY * perDay : -1;
  let first = span.start;
  for (let day = span.start + perDay; day <= span.end; day += perDay) {
    if (day < span.end && repeats(column.values, day, perDay)) continue;
    const days = (day - first) / perDay;
    if (days >= fewest) {
      // A copy of the 28th is how a source makes a leap day: nothing is wrong with the 28th, and one day is no climate.
      const leapCopy = days === 2 && day === leapDayEnd;
      tellRepeated(hours, { column, start: first, end: day, days, leapCopy }, findings);
      for (let step = first; step < day && !leapCopy; step++) leaveOut(hours, step, column.bit);
    }
    first = day;
  }
}

function tellRepeated(
  hours: TestedHours,
  run: StepSpan & { column: TestedColumn; days: number; leapCopy: boolean },
  findings: FindingList,
): void {
  const { column, days, end, leapCopy, start } = run;
  const { variable } = column;
  const sentence = leapCopy
    ? `the ${variable} of 29 February is that of the 28th, hour by hour: the source has copied it. It is used as it stands.`
    : `the ${variable} is the same, hour by hour, on ${days} days in a row; which of them was recorded cannot be told, so they are left out.`;
  tellSpan(
    hours,
    {
      start,
      end,
      code: leapCopy ? 'leap-day' : 'stuck',
      severity: leapCopy ? 'note' : 'doubt',
      variable,
      done: leapCopy ? 'kept' : 'left out',
      sentence: () => sentence,
    },
    findings,
  );
}

/** Whether a day, all of whose values are there, is that of the day before. */
function repeats(values: Int16Array, day: number, perDay: number): boolean {
  for (let step = day; step < day + perDay; step++) {
    if (values[step] === MISSING_INT16 || values[step] !== values[step - perDay]) return false;
  }
  return true;
}

function sameHours(hours: TestedHours, column: TestedColumn, span: StepSpan, findings: FindingList): void {
  const perDay = hours.stepsPerDay;
  const { values } = column;
  const longest = SAME_HOUR_DAYS[column.resolution.usual];
  const calendar = { end: span.end, perDay };
  for (let hour = span.start; hour < span.start + perDay; hour++) {
    if (!mayRepeat(values, calendar, hour)) continue;
    let first = hour;
    for (let step = hour + perDay; ; step += perDay) {
      if (step < span.end && values[step] === values[first]) continue;
      const days = (step - first) / perDay;
      if (days >= longest && values[first] !== MISSING_INT16) {
        leaveOutSameHour(hours, { column, first, end: step, days }, findings);
      }
      if (step >= span.end) break;
      first = step;
    }
  }
}

/** Whether an hour of the day may stay the same for 15 days: such a run holds a seventh day that is like those beside it. */
function mayRepeat(values: Int16Array, { end, perDay }: { end: number; perDay: number }, hour: number): boolean {
  for (let step = hour + 7 * perDay; step < end; step += 7 * perDay) {
    if (values[step] === values[step - perDay] && (step + perDay >= end || values[step] === values[step + perDay]))
      return true;
  }
  return false;
}

function leaveOutSameHour(
  hours: TestedHours,
  run: { column: TestedColumn; first: number; end: number; days: number },
  findings: FindingList,
): void {
  const { column, days, end, first } = run;
  const value = degrees(column.values[first] ?? 0);
  tellSpan(
    hours,
    {
      start: first,
      end: end - hours.stepsPerDay + 1,
      steps: days,
      code: 'stuck',
      severity: 'doubt',
      variable: column.variable,
      done: 'left out',
      sentence: () =>
        `the ${column.variable} is ${value} °C at the same hour of ${days} days in a row; these hours are left out.`,
    },
    findings,
  );
  for (let step = first; step < end; step += hours.stepsPerDay) leaveOut(hours, step, column.bit);
}
