import { HOURS_PER_DAY } from '../../conventions.ts';
import { monthOfEachSlot } from '../../reduction/calendar.ts';
import { LONGEST_SHORT_GAP_HOURS } from './fill-gaps.ts';

const LONGEST_HOURS = 47;

/**
 * Gap rule 2, asked for by a person: 6 to 47 missing hours take the mean of the same hour on the last day before and on the first
 * day after the gap (weighted by their nearness where one is two days away), shifted so that it meets the hours at both ends. Nothing is filled where one of these values is missing or filled
 * itself, and, as in rule 1, not across the end of a year nor across the joint of two months in a typical year.
 * @param column hourly values in slot order, NaN where missing; filled in place
 * @returns which slots were filled, as 0 or 1
 */
export function fillLongGaps(column: Float64Array, typical: boolean): Uint8Array {
  const months = monthOfEachSlot(column.length);
  const filled = new Uint8Array(column.length);
  for (let slot = 0; slot < column.length; slot++) {
    if (!Number.isNaN(column[slot])) continue;
    const start = slot;
    while (slot < column.length && Number.isNaN(column[slot])) slot++;
    const hours = slot - start;
    if (hours <= LONGEST_SHORT_GAP_HOURS || hours > LONGEST_HOURS) continue;
    if (start === 0 || slot === column.length || (typical && months[start - 1] !== months[slot])) continue;
    fillOne(column, filled, { start, end: slot });
  }
  return filled;
}

function fillOne(column: Float64Array, filled: Uint8Array, gap: { start: number; end: number }): void {
  const { end, start } = gap;
  const donor = (slot: number) => (filled[slot] === 1 ? Number.NaN : (column[slot] ?? Number.NaN));
  const usual = (slot: number) => {
    const daysBack = Math.max(1, Math.floor((slot - start) / HOURS_PER_DAY) + 1);
    const daysOn = Math.max(1, Math.floor((end - 1 - slot) / HOURS_PER_DAY) + 1);
    const before = donor(slot - daysBack * HOURS_PER_DAY);
    const after = donor(slot + daysOn * HOURS_PER_DAY);
    return (before * daysOn + after * daysBack) / (daysBack + daysOn);
  };
  const shiftBefore = donor(start - 1) - usual(start - 1);
  const shiftAfter = donor(end) - usual(end);
  const values = Float64Array.from({ length: end - start }, (_none, at) => {
    const share = (at + 1) / (end - start + 1);
    return usual(start + at) + shiftBefore + share * (shiftAfter - shiftBefore);
  });
  if (values.some((value) => Number.isNaN(value))) return;
  column.set(values, start);
  filled.fill(1, start, end);
}
