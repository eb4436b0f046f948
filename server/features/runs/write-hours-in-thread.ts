import { type HourClass, hourClasses } from '#engine/hour-classes/hour-class.ts';
import { hoursCsv } from '#engine/run/hours-csv.ts';
import { type HoursTable, hoursTable } from '#engine/run/hours-table.ts';
import type { HourRows, HourRowsTask, HoursTask, WrittenHours } from '../../jobs/year-task.ts';

const codes = new Map<HourClass, number>(hourClasses.map((hourClass, code) => [hourClass, code]));

/** The hours of a run as the command line writes them, laid on the run's own clock. */
export function writeHoursInThread({ origin, ...input }: HoursTask): WrittenHours {
  const table = hoursTable(input);
  return {
    bytes: new TextEncoder().encode(hoursCsv(table, origin)),
    hourClassCodes: codesOf(table),
  };
}

/** Some hours of a run as rows. */
export function hourRowsInThread({ slots, ...input }: HourRowsTask): HourRows {
  const table = hoursTable(input);
  return {
    rows: slots.flatMap((slot) => table.rows[slot] ?? []),
    limitUnit: table.limitUnit,
    hourClassCodes: codesOf(table),
  };
}

function codesOf({ rows }: HoursTable): Uint8Array {
  return Uint8Array.from(rows, ({ hourClass }) => codes.get(hourClass) ?? 0);
}
