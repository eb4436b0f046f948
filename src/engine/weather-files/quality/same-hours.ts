import { MISSING_INT16 } from '../../conventions.ts';
import type { FindingList } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, leaveOut, type StepSpan, type TestedColumn, type TestedHours } from './tested-hours.ts';

/** Successive days with the same value at the same hour, by resolution, 0.01 K (HadISD). */
const LONGEST_DAYS = { 100: 25, 50: 20, 10: 15 } as const;

/** One value at the same hour of many days in a row is left out on all of them. */
export function sameHours(hours: TestedHours, findings: FindingList): void {
  for (const column of [hours.dryBulb, hours.dewPoint]) {
    for (const span of hours.unbroken) hoursWithin(hours, column, span, findings);
  }
}

// Four arguments: the year, the column, the stretch and the list belong to one pass.
function hoursWithin(hours: TestedHours, column: TestedColumn, span: StepSpan, findings: FindingList): void {
  const perDay = hours.stepsPerDay;
  const { values } = column;
  const longest = LONGEST_DAYS[column.resolution.usual];
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
