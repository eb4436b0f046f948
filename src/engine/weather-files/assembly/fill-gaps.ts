import { monthOfEachSlot } from '../../reduction/calendar.ts';
import { forEachRun, markMissing } from './step-columns.ts';

export const LONGEST_SHORT_GAP_HOURS = 5;

/**
 * Gap rule 1: at most 5 missing hours are filled on a straight line in time between the hours before and after; never from
 * one year's end to its beginning, and in a typical year never across the joint of two months.
 * @param column hourly values in slot order, NaN where missing; filled in place
 * @returns which slots were filled, as 0 or 1
 */
export function fillShortGaps(column: Float64Array, typical: boolean): Uint8Array {
  const months = monthOfEachSlot(column.length);
  const filled = new Uint8Array(column.length);
  forEachRun(markMissing(column), (start, end) => {
    const before = column[start - 1];
    const after = column[end];
    if (end - start > LONGEST_SHORT_GAP_HOURS || before === undefined || after === undefined) return;
    if (typical && months[start - 1] !== months[end]) return;
    for (let slot = start; slot < end; slot++) {
      column[slot] = before + ((after - before) * (slot - start + 1)) / (end - start + 1);
      filled[slot] = 1;
    }
  });
  return filled;
}
