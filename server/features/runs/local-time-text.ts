import { calendarDayMs, civilLeadMin, type ResolvedClock } from '#engine/clock/resolved-clock.ts';
import { HOURS_PER_DAY } from '#engine/conventions.ts';

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const MS_PER_HOUR = 3_600_000;
const MS_PER_MIN = 60_000;

/** When a slot begins on the run's own clock, as people write it: "14 Jan 13:00". */
export function slotStartText(clock: ResolvedClock, slot: number): string {
  return instantText(clock, { slot, hoursIntoSlot: 0 });
}

/** When a slot ends. */
export function slotEndText(clock: ResolvedClock, slot: number): string {
  return instantText(clock, { slot, hoursIntoSlot: 1 });
}

/** A day of the year, 0 first: "14 Jan". */
export function dayText(clock: ResolvedClock, day: number): string {
  return dateText(new Date(calendarDayMs(clock, day)));
}

function instantText(clock: ResolvedClock, { slot, hoursIntoSlot }: { slot: number; hoursIntoSlot: number }): string {
  const day = Math.floor(slot / HOURS_PER_DAY);
  const hour = (slot % HOURS_PER_DAY) + hoursIntoSlot;
  const leadMin = civilLeadMin(clock)[slot] ?? 0;
  const local = new Date(calendarDayMs(clock, day) + hour * MS_PER_HOUR + leadMin * MS_PER_MIN);
  return `${dateText(local)} ${local.toISOString().slice(11, 16)}`;
}

/** The instants above are local times written as if they were UTC. */
function dateText(local: Date): string {
  return `${local.getUTCDate()} ${MONTHS[local.getUTCMonth()] ?? ''}`;
}
