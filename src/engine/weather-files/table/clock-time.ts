/** From local clock time with daylight saving to UTC, row after row in the order of the file. */
import { zoneOffset } from '../../clock/zone-offset.ts';

const MS_PER_MIN = 60_000;
const MINUTES_PER_DAY = 1440;

/**
 * A function from clock time, minutes since 1970 on the clock, to minutes UTC. An hour that comes twice in autumn is the earlier
 * one when it is met first and the later one when it is met again; a time that spring skips is taken on the clock before it.
 * @throws RangeError on a zone that is not known
 */
export function clockTimeReader(zone: string): (clockMinutes: number) => number {
  const offsetAt = rememberedByDay(zoneOffset(zone));
  const met = new Set<number>();
  return (clockMinutes) => {
    const before = offsetAt(clockMinutes - MINUTES_PER_DAY);
    const after = offsetAt(clockMinutes + MINUTES_PER_DAY);
    const earlier = clockMinutes - Math.max(before, after);
    const later = clockMinutes - Math.min(before, after);
    if (before === after) return earlier;
    const earlierHolds = offsetAt(earlier) === Math.max(before, after);
    const laterHolds = offsetAt(later) === Math.min(before, after);
    if (!earlierHolds || !laterHolds) return earlierHolds ? earlier : laterHolds ? later : clockMinutes - before;
    const again = met.has(clockMinutes);
    met.add(clockMinutes);
    return again ? later : earlier;
  };
}

/** Days whose offset does not change are looked up once. Minutes UTC to minutes ahead. */
function rememberedByDay(offsetAt: (instantMs: number) => number): (minutes: number) => number {
  const days = new Map<number, number | null>();
  const dayOffset = (day: number): number | null => {
    const known = days.get(day);
    if (known !== undefined) return known;
    const first = offsetAt(day * MINUTES_PER_DAY * MS_PER_MIN);
    const last = offsetAt((day + 1) * MINUTES_PER_DAY * MS_PER_MIN);
    const offset = first === last ? first : null;
    days.set(day, offset);
    return offset;
  };
  return (minutes) => dayOffset(Math.floor(minutes / MINUTES_PER_DAY)) ?? offsetAt(minutes * MS_PER_MIN);
}
