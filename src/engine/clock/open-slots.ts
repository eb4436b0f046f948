/**
 * Which slots of a year a brief's schedule opens (method 3): a slot ending at h is open when h - 1 >= opening and
 * h <= closing. Where civil time stands half an hour off the slots, the slot's end decides: opening < h <= closing, which
 * is the same rule on whole hours. Daylight opens the slots in whose middle the sun is up.
 */
import type { Brief } from '../brief/brief.ts';
import { parseHours } from '../brief/schedule-hours.ts';
import { solarAltitudeDeg } from './daylight.ts';
import { calendarDayMs, civilLeadMin, type ResolvedClock } from './resolved-clock.ts';

const MIN_PER_DAY = 1440;

type Schedule = Pick<Brief, 'months' | 'weekdays' | 'hours'>;

/** Many stations share a clock: their slots are found once. */
const remembered = new Map<string, Uint8Array>();
const MOST_REMEMBERED = 500;

/**
 * @returns one value per slot: 1 open, 0 closed; read only, since years of one clock share it
 * @throws RangeError when the hours cannot be read, or are `daylight` and the clock has no place for it
 */
export function openSlots(brief: Schedule, clock: ResolvedClock): Uint8Array {
  const { months, weekdays, hours } = brief;
  const key = JSON.stringify([months, weekdays, hours, clock]);
  const open = remembered.get(key) ?? findOpenSlots(brief, clock);
  if (remembered.size >= MOST_REMEMBERED) remembered.clear();
  remembered.set(key, open);
  return open;
}

function findOpenSlots(brief: Schedule, clock: ResolvedClock): Uint8Array {
  const hourOpens = openHours(brief, clock);
  const lead = civilLeadMin(clock);
  const open = new Uint8Array(clock.slots);
  const dayOpens = openDays(brief, clock);
  for (let slot = 0; slot < clock.slots; slot++) {
    const endMin = (slot + 1) * 60 + (lead[slot] ?? 0);
    const day = Math.ceil(endMin / MIN_PER_DAY) - 1;
    const hourEnding = (endMin - day * MIN_PER_DAY) / 60;
    if (dayOpens(day) && hourOpens(slot, hourEnding)) open[slot] = 1;
  }
  return open;
}

/** Answers for a slot that ends at an hour of the civil day, over 0 and up to 24. */
function openHours(
  brief: Pick<Brief, 'hours'>,
  { daylightAt: position, utcOffsetMin }: ResolvedClock,
): (slot: number, hourEnding: number) => boolean {
  const hours = parseHours(brief.hours);
  if (hours === null) throw new RangeError(`hours of a schedule cannot be used: ${brief.hours}`);
  if (hours !== 'daylight') return (_slot, hourEnding) => hourEnding > hours.opening && hourEnding <= hours.closing;
  if (position === undefined) throw new RangeError('daylight hours need a place');
  return (slot) => solarAltitudeDeg({ slot, position, utcOffsetMin }) > 0;
}

/** Answers for civil days -1 .. 366 of the calendar; standard and civil dates differ by at most one day. */
function openDays(brief: Pick<Brief, 'months' | 'weekdays'>, clock: ResolvedClock): (day: number) => boolean {
  const days = clock.slots / 24;
  const answers: boolean[] = [];
  for (let day = -1; day <= days; day++) {
    const date = new Date(calendarDayMs(clock, day));
    const weekday = date.getUTCDay();
    const monthOpens = brief.months === 'all' || brief.months.includes(date.getUTCMonth() + 1);
    const weekdayOpens = brief.weekdays === 'all' || (weekday >= 1 && weekday <= 5);
    answers.push(monthOpens && weekdayOpens);
  }
  return (day) => answers[day + 1] ?? false;
}
