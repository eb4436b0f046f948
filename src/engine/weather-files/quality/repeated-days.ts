import { MISSING_INT16 } from '../../conventions.ts';
import { hasLeapDay } from '../../reduction/calendar.ts';
import type { FindingList } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { leaveOut, type StepSpan, type TestedColumn, type TestedHours } from './tested-hours.ts';

/** Successive days that are the same in every hour, by resolution, 0.01 K (HadISD). */
const WHOLE_DAYS = {
  'dry bulb': { 100: 10, 50: 7, 10: 5 },
  'dew point': { 100: 10, 50: 7, 10: 2 },
} as const;
/** 29 February is the 60th day. */
const LEAP_DAY = 60;

/** Whole days that repeat the day before are left out, the first of them with the others: which was recorded cannot be told. */
export function repeatedDays(hours: TestedHours, findings: FindingList): void {
  for (const column of [hours.dryBulb, hours.dewPoint]) {
    for (const span of hours.unbroken) daysWithin(hours, column, span, findings);
  }
}

// Four arguments: the year, the column, the stretch and the list belong to one pass.
function daysWithin(hours: TestedHours, column: TestedColumn, span: StepSpan, findings: FindingList): void {
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
