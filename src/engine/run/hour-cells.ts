/** Hours by month (12) x hour of day (24), in the slots' standard time: month by month, what tables and coverage are read from. */
import type { OpenSchedule } from '../clock/open-schedule.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { HourCounts } from './count-hours.ts';
import type { JudgedYear } from './judged-year.ts';

export const MONTH_HOUR_CELLS = 12 * HOURS_PER_DAY;

export interface HourCells {
  /** Hours in schedule, and of them those whose weather is known. */
  readonly scheduled: Uint16Array;
  readonly present: Uint16Array;
  readonly demand: Uint16Array;
  readonly met: Uint16Array;
}

const present = new Uint16Array(MONTH_HOUR_CELLS);
const met = new Uint16Array(MONTH_HOUR_CELLS);

/**
 * @param counts of the demand hours of the same year
 * @returns cells that belong to the next year as soon as that is counted
 */
export function hourCells({ slots, schedule, missing }: JudgedYear, { demand, unmetCells }: HourCounts): HourCells {
  const cellOf = cellOfEachSlot(slots);
  const scheduled = scheduledByCell(schedule);
  present.set(scheduled);
  for (let index = 0; index < missing.length; index++) {
    const slot = missing[index] ?? 0;
    if (schedule.open[slot] === 1) add(present, cellOf[slot] ?? 0, -1);
  }
  for (let cell = 0; cell < MONTH_HOUR_CELLS; cell++) met[cell] = (demand[cell] ?? 0) - (unmetCells[cell] ?? 0);
  return { scheduled, present, demand, met };
}

/** Sum of a month's cells, 0 January. */
export function sumOfMonth(cells: Uint16Array, month: number): number {
  let sum = 0;
  for (let hour = 0; hour < HOURS_PER_DAY; hour++) sum += cells[month * HOURS_PER_DAY + hour] ?? 0;
  return sum;
}

/** The cells as rows of a month each. */
export function monthRows(cells: Uint16Array): number[][] {
  const rows: number[][] = [];
  for (let from = 0; from < MONTH_HOUR_CELLS; from += HOURS_PER_DAY) {
    const row: number[] = [];
    for (let cell = from; cell < from + HOURS_PER_DAY; cell++) row.push(cells[cell] ?? 0);
    rows.push(row);
  }
  return rows;
}

function add(cells: Uint16Array, cell: number, count: number): void {
  cells[cell] = (cells[cell] ?? 0) + count;
}

const schedules = new WeakMap<OpenSchedule, Uint16Array>();

function scheduledByCell(schedule: OpenSchedule): Uint16Array {
  const counted = schedules.get(schedule);
  if (counted !== undefined) return counted;
  const cellOf = cellOfEachSlot(schedule.open.length);
  const scheduled = new Uint16Array(MONTH_HOUR_CELLS);
  for (const slot of schedule.slots) add(scheduled, cellOf[slot] ?? 0, 1);
  schedules.set(schedule, scheduled);
  return scheduled;
}

const cellsOfYears = new Map<number, Uint16Array>();

/** The cell of every slot. There are two such columns, each made once: they are read only. */
export function cellOfEachSlot(slots: number): Uint16Array {
  const made = cellsOfYears.get(slots) ?? makeCells(slots);
  cellsOfYears.set(slots, made);
  return made;
}

function makeCells(slots: number): Uint16Array {
  return Uint16Array.from(
    monthOfEachSlot(slots),
    (month, slot) => (month - 1) * HOURS_PER_DAY + (slot % HOURS_PER_DAY),
  );
}
