import { HOURS_PER_DAY } from '../engine/conventions.ts';
import { monthStarts } from './calendar.ts';
import { daysOf } from './year-cloth.ts';

/** Hours that are wanted, by month (0 to 11) and hour of day (0 to 23). @throws RangeError when `codes` is not a whole year */
export function monthHours(codes: Uint8Array, isWanted: (code: number) => boolean): readonly (readonly number[])[] {
  const starts = monthStarts(daysOf(codes));
  const counts = starts.map(() => Array.from({ length: HOURS_PER_DAY }, () => 0));
  codes.forEach((code, slot) => {
    if (!isWanted(code)) return;
    const day = Math.floor(slot / HOURS_PER_DAY);
    const row = counts[starts.findLastIndex((start) => start <= day)];
    const hour = slot % HOURS_PER_DAY;
    if (row !== undefined) row[hour] = (row[hour] ?? 0) + 1;
  });
  return counts;
}
