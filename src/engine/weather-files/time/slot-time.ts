import { type CivilTime, civilTime } from './civil-minutes.ts';

const HALF_HOUR_MIN = 30;

/**
 * The full hour nearest to an instant, as hours since 1970 on the same clock; the later of two equally near. A reading at half
 * past belongs to the hour that contains it, which ends then.
 */
export function nearestHour(minutes: number): number {
  return Math.floor((minutes + HALF_HOUR_MIN) / 60);
}

/** The slot that ends at an instant, minutes since 1970: hour 1 to 24 of the day that it belongs to, minute 1 to 60 within it. */
export function slotEndingAt(minutes: number): CivilTime {
  const begin = civilTime(minutes - 1);
  return { ...begin, hour: begin.hour + 1, minute: begin.minute + 1 };
}
