import { type HourClass, hourClasses } from '#engine/hour-classes/hour-class.ts';
import { hoursCsv } from '#engine/run/hours-csv.ts';
import { hoursTable } from '#engine/run/hours-table.ts';
import type { HoursTask, WrittenHours } from '../../jobs/year-task.ts';

const codes = new Map<HourClass, number>(hourClasses.map((hourClass, code) => [hourClass, code]));

/** The hours of a run as the command line writes them, laid on the run's own clock. */
export function writeHoursInThread({ origin, ...input }: HoursTask): WrittenHours {
  const table = hoursTable(input);
  return {
    bytes: new TextEncoder().encode(hoursCsv(table, origin)),
    hourClassCodes: Uint8Array.from(table.rows, ({ hourClass }) => codes.get(hourClass) ?? 0),
  };
}
