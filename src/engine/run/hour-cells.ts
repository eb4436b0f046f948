/** Hours by month (12) x hour of day (24), in the slots' standard time: month by month, what tables and coverage are read from. */
import type { OpenSchedule } from '../clock/open-schedule.ts';
import { HOURS_PER_DAY } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import { monthHourOfEachSlot, monthStartSlots } from '../reduction/calendar.ts';
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
const demand = new Uint16Array(MONTH_HOUR_CELLS);
const met = new Uint16Array(MONTH_HOUR_CELLS);

/**
 * @param counts of the demand hours of the same year
 * @returns cells that belong to the next year as soon as that is counted
 */
export function hourCells({ slots, classCodes, schedule, missing }: JudgedYear, { unmetCells }: HourCounts): HourCells {
  const cellOf = monthHourOfEachSlot(slots);
  countDemand(classCodes);
  const scheduled = scheduledByCell(schedule);
  present.set(scheduled);
  for (let index = 0; index < missing.length; index++) {
    const slot = missing[index] ?? 0;
    if (schedule.open[slot] === 1) add(present, cellOf[slot] ?? 0, -1);
  }
  for (let cell = 0; cell < MONTH_HOUR_CELLS; cell++) met[cell] = (demand[cell] ?? 0) - (unmetCells[cell] ?? 0);
  return { scheduled, present, demand, met };
}

/** The first class of hours with demand; `closed`, `missing` and `idle` stand before it. */
const FIRST_WITH_DEMAND = hourClasses.indexOf('idle') + 1;
/** Four hours as one number: what lifts a class with demand to the highest bit of its byte, that bit, and how far it stands from the lowest. */
const LIFT = Math.imul(0x80 - FIRST_WITH_DEMAND, 0x01010101);
const HIGHEST_BITS = 0x80808080;
const TO_LOWEST = 7;
const HOURS_AT_ONCE = 4;
const NUMBERS_PER_DAY = HOURS_PER_DAY / HOURS_AT_ONCE;
const demandOfMonth = new Int32Array(NUMBERS_PER_DAY);
const demandOfMonthBytes = new Uint8Array(demandOfMonth.buffer);

/** Hours with demand by cell, four hours of a day at a time: a month has fewer days than a byte can count. */
function countDemand(classCodes: Uint8Array): void {
  const starts = monthStartSlots(classCodes.length);
  const fours = new Int32Array(classCodes.buffer, classCodes.byteOffset, classCodes.length / HOURS_AT_ONCE);
  for (let month = 0; month < 12; month++) {
    const end = (starts[month + 1] ?? 0) / HOURS_AT_ONCE;
    for (let nth = 0; nth < NUMBERS_PER_DAY; nth++) {
      let sum = 0;
      for (let at = (starts[month] ?? 0) / HOURS_AT_ONCE + nth; at < end; at += NUMBERS_PER_DAY) {
        sum = (sum + ((((fours[at] ?? 0) + LIFT) & HIGHEST_BITS) >>> TO_LOWEST)) | 0;
      }
      demandOfMonth[nth] = sum;
    }
    demand.set(demandOfMonthBytes, month * HOURS_PER_DAY);
  }
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
  const cellOf = monthHourOfEachSlot(schedule.open.length);
  const scheduled = new Uint16Array(MONTH_HOUR_CELLS);
  for (const slot of schedule.slots) add(scheduled, cellOf[slot] ?? 0, 1);
  schedules.set(schedule, scheduled);
  return scheduled;
}
