import { HOURS_PER_DAY } from '../conventions.ts';
import { monthStartSlots } from '../reduction/calendar.ts';
import type { MonthClimate } from './monthly-change.ts';

const MONTHS = 12;

/**
 * Mean, mean daily highest and mean daily lowest dry bulb of each month, January first. The mean is over every known hour;
 * the swing over the days that are wholly known, or, where a month has none, over the hours that are.
 * @param dryBulbC slot order, NaN where missing
 * @returns null for a month without a known hour
 */
export function monthClimates(dryBulbC: Float64Array): readonly (MonthClimate | null)[] {
  const starts = monthStartSlots(dryBulbC.length);
  return Array.from({ length: MONTHS }, (_none, month) =>
    climateOf(dryBulbC.subarray(starts[month] ?? 0, starts[month + 1] ?? 0)),
  );
}

function climateOf(hours: Float64Array): MonthClimate | null {
  const known = hours.filter((value) => !Number.isNaN(value));
  if (known.length === 0) return null;
  const meanC = known.reduce((sum, value) => sum + value, 0) / known.length;
  const whole = daysOf(hours).filter((day) => day.length === HOURS_PER_DAY);
  const days = whole.length > 0 ? whole : daysOf(hours).filter((day) => day.length > 0);
  const meanOver = (figure: (day: Float64Array) => number): number =>
    days.reduce((sum, day) => sum + figure(day), 0) / days.length;
  return { meanC, meanMaxC: meanOver((day) => Math.max(...day)), meanMinC: meanOver((day) => Math.min(...day)) };
}

/** The known hours of each day. */
function daysOf(hours: Float64Array): readonly Float64Array[] {
  return Array.from({ length: hours.length / HOURS_PER_DAY }, (_none, day) =>
    hours.subarray(day * HOURS_PER_DAY, (day + 1) * HOURS_PER_DAY).filter((value) => !Number.isNaN(value)),
  );
}
