import { monthOfEachSlot, monthStartSlots } from '../reduction/calendar.ts';
import { type HourCells, sumOfMonth } from '../run/hour-cells.ts';

/** How much of the schedule the weather covers, and whether the year may be used for the brief (method 2 and 7.1). */
export interface Coverage {
  readonly present: number;
  readonly scheduled: number;
  readonly coveredPct: number;
  readonly usable: boolean;
  /** Months in schedule, 1..12, with less than 90 % of their hours. */
  readonly monthsShort: readonly number[];
}

/** A month counts with 90 % of its hours; coverage of the schedule passes with as much. */
export const LEAST_COVERED_PCT = 90;

interface MonthCount {
  readonly slots: number;
  readonly known: number;
  readonly scheduled: number;
  readonly present: number;
  readonly demand: number;
}

/**
 * Months whose hours were looked at and showed no demand are left out of the share; a month with no known hour is not.
 * @param input.missing slots whose weather is not known, in schedule or not
 */
export function coverageOf(input: { slots: number; missing: Uint16Array; cells: HourCells }): Coverage {
  const months = countMonths(input);
  const inSchedule = months.filter((month) => month.scheduled > 0);
  const counted = inSchedule.filter((month) => month.present === 0 || month.demand > 0);
  const present = counted.reduce((sum, month) => sum + month.present, 0);
  const scheduled = counted.reduce((sum, month) => sum + month.scheduled, 0);
  const monthsShort = months.flatMap((month, index) =>
    month.scheduled > 0 && 100 * month.known < LEAST_COVERED_PCT * month.slots ? [index + 1] : [],
  );
  return {
    present,
    scheduled,
    coveredPct: scheduled === 0 ? 100 : (100 * present) / scheduled,
    usable: monthsShort.length === 0,
    monthsShort,
  };
}

function countMonths({ slots, missing, cells }: Parameters<typeof coverageOf>[0]): MonthCount[] {
  const monthOf = monthOfEachSlot(slots);
  const unknown = new Uint16Array(12);
  for (let index = 0; index < missing.length; index++) {
    const slot = missing[index] ?? 0;
    const month = (monthOf[slot] ?? 1) - 1;
    unknown[month] = (unknown[month] ?? 0) + 1;
  }
  const starts = monthStartSlots(slots);
  return Array.from({ length: 12 }, (_none, month) => {
    const slotsOfMonth = (starts[month + 1] ?? 0) - (starts[month] ?? 0);
    return {
      slots: slotsOfMonth,
      known: slotsOfMonth - (unknown[month] ?? 0),
      scheduled: sumOfMonth(cells.scheduled, month),
      present: sumOfMonth(cells.present, month),
      demand: sumOfMonth(cells.demand, month),
    };
  });
}
