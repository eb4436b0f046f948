import { HOURS_PER_DAY } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { JudgedYear } from './judged-year.ts';
import type { ScaledCounts } from './run-result.ts';

/** Month (12) x hour of day (24), in the slots' standard time. */
const CELLS = 12 * HOURS_PER_DAY;
const CLOSED = hourClasses.indexOf('closed');
const MISSING = hourClasses.indexOf('missing');

/**
 * Demand and met hours scaled by month x hour of day: each cell's counts times its scheduled over its present hours. A
 * missing hour is never counted as not met (method 2).
 */
export function scaleForMissing(judged: JudgedYear): ScaledCounts {
  const cells = countCells(judged);
  let demand = 0;
  let met = 0;
  let unknown = 0;
  for (let cell = 0; cell < CELLS; cell++) {
    const scheduled = cells.scheduled[cell] ?? 0;
    const present = cells.present[cell] ?? 0;
    if (present === 0) unknown += scheduled;
    else {
      demand += ((cells.demand[cell] ?? 0) * scheduled) / present;
      met += ((cells.met[cell] ?? 0) * scheduled) / present;
    }
  }
  return { demand, met, unknown };
}

interface Cells {
  readonly scheduled: Uint32Array;
  readonly present: Uint32Array;
  readonly demand: Uint32Array;
  readonly met: Uint32Array;
}

function countCells({ slots, classCodes, hours }: JudgedYear): Cells {
  const months = monthOfEachSlot(slots);
  const numbers = () => new Uint32Array(CELLS);
  const cells = { scheduled: numbers(), present: numbers(), demand: numbers(), met: numbers() };
  const cellOf = (slot: number) => ((months[slot] ?? 1) - 1) * HOURS_PER_DAY + (slot % HOURS_PER_DAY);
  for (let slot = 0; slot < slots; slot++) {
    const code = classCodes[slot];
    if (code === CLOSED) continue;
    const cell = cellOf(slot);
    cells.scheduled[cell] = (cells.scheduled[cell] ?? 0) + 1;
    if (code !== MISSING) cells.present[cell] = (cells.present[cell] ?? 0) + 1;
  }
  for (let at = 0; at < hours.count; at++) {
    const cell = cellOf(hours.slot[at] ?? 0);
    cells.demand[cell] = (cells.demand[cell] ?? 0) + 1;
    cells.met[cell] = (cells.met[cell] ?? 0) + (hours.met[at] ?? 0);
  }
  return cells;
}
