import type { DeclaredPeriod } from '../assembly/match-calendar.ts';
import type { FindingList } from '../finding-list.ts';
import { quoted } from '../text/number-field.ts';
import { headerNumber } from './header-fields.ts';
import { readPeriodDate } from './period-date.ts';

const FIELDS_PER_PERIOD = 4;
const MOST_PERIODS = 200;
const WEEKDAYS = ['sun', 'mon', 'tue', 'wed', 'thu', 'fri', 'sat'];

/** DATA PERIODS: number of periods, records per hour, then name, start weekday, start and end date of each. */
export function readDataPeriods(
  fields: readonly string[],
  line: number,
  findings: FindingList,
): { periods: readonly DeclaredPeriod[]; recordsPerHour: number } {
  const count = headerNumber(fields[1]);
  const recordsPerHour = headerNumber(fields[2]);
  const countIsGood = count !== null && Number.isInteger(count) && count >= 1 && count <= MOST_PERIODS;
  const recordsAreGood = recordsPerHour !== null && recordsPerHour >= 1 && 60 % recordsPerHour === 0;
  if (!countIsGood) {
    findings.add({
      code: 'header',
      severity: 'refuse',
      line,
      message: () =>
        `Line ${line}: DATA PERIODS gives ${quoted(fields[1] ?? '')} as its number of periods, where 1 or more is wanted. Mend the record.`,
    });
  }
  if (!recordsAreGood) {
    findings.add({
      code: 'header',
      severity: 'refuse',
      line,
      message: () =>
        `Line ${line}: DATA PERIODS gives ${quoted(fields[2] ?? '')} records an hour, where a number that divides 60 is wanted. Mend the record.`,
    });
  }
  const periods = Array.from({ length: countIsGood ? count : 1 }, (_none, index) =>
    readPeriod(fields.slice(3 + index * FIELDS_PER_PERIOD, 3 + (index + 1) * FIELDS_PER_PERIOD)),
  );
  return { periods, recordsPerHour: recordsAreGood ? recordsPerHour : 1 };
}

function readPeriod(fields: readonly string[]): DeclaredPeriod {
  const weekday = WEEKDAYS.indexOf((fields[1] ?? '').slice(0, 3).toLowerCase());
  // A day number counts in a common year unless the period ends on day 366.
  const leap = fields[3] === '366';
  return {
    name: fields[0] ?? '',
    startWeekday: weekday < 0 ? null : weekday,
    start: readPeriodDate(fields[2] ?? '', leap),
    end: readPeriodDate(fields[3] ?? '', leap),
  };
}
