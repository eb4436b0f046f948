import { hourClasses } from '../hour-classes/hour-class.ts';
import { monthOfEachSlot } from '../reduction/calendar.ts';

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
  slots: number;
  known: number;
  scheduled: number;
  present: number;
  demand: number;
}

/**
 * Months whose hours were looked at and showed no demand are left out of the share; a month with no known hour is not.
 * @param input.known 1 where the slot's weather is known, in schedule or not
 */
export function coverageOf(input: { classCodes: Uint8Array; known: Uint8Array }): Coverage {
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

function countMonths({ classCodes, known }: { classCodes: Uint8Array; known: Uint8Array }): MonthCount[] {
  const monthOf = monthOfEachSlot(classCodes.length);
  const months = Array.from({ length: 12 }, () => ({ slots: 0, known: 0, scheduled: 0, present: 0, demand: 0 }));
  for (let slot = 0; slot < classCodes.length; slot++) {
    const month = months[(monthOf[slot] ?? 1) - 1];
    if (month === undefined) continue;
    const hourClass = hourClasses[classCodes[slot] ?? 0];
    month.slots += 1;
    month.known += known[slot] ?? 0;
    if (hourClass === 'closed') continue;
    month.scheduled += 1;
    if (hourClass === 'missing') continue;
    month.present += 1;
    if (hourClass !== 'idle') month.demand += 1;
  }
  return months;
}
