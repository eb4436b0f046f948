import { HOURS_PER_DAY } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';
import type { JudgedYear } from './judged-year.ts';
import type { ScaledCounts } from './run-result.ts';

interface Cell {
  scheduled: number;
  present: number;
  demand: number;
  met: number;
}

/**
 * Demand and met hours scaled by month x hour of day: each cell's counts times its scheduled over its present hours. A
 * missing hour is never counted as not met (method 2).
 */
export function scaleForMissing(judged: JudgedYear): ScaledCounts {
  let demand = 0;
  let met = 0;
  let unknown = 0;
  for (const cell of cellsOf(judged)) {
    if (cell.present === 0) unknown += cell.scheduled;
    else {
      demand += (cell.demand * cell.scheduled) / cell.present;
      met += (cell.met * cell.scheduled) / cell.present;
    }
  }
  return { demand, met, unknown };
}

/** 288 cells: month (12) x hour of day (24), in the slots' standard time. */
function cellsOf(judged: JudgedYear): Cell[] {
  const months = monthOfEachSlot(judged.slots);
  const cells = Array.from({ length: 12 * HOURS_PER_DAY }, () => ({ scheduled: 0, present: 0, demand: 0, met: 0 }));
  const cellAt = (slot: number): Cell | undefined =>
    cells[((months[slot] ?? 1) - 1) * HOURS_PER_DAY + (slot % HOURS_PER_DAY)];
  const closed = hourClasses.indexOf('closed');
  const missing = hourClasses.indexOf('missing');
  for (const [slot, code] of judged.classCodes.entries()) {
    const cell = cellAt(slot);
    if (code === closed || cell === undefined) continue;
    cell.scheduled += 1;
    if (code !== missing) cell.present += 1;
  }
  for (const { slot, judgement } of judged.demandHours) {
    const cell = cellAt(slot);
    if (cell === undefined) continue;
    cell.demand += 1;
    if (judgement.met) cell.met += 1;
  }
  return cells;
}
