import type { Brief } from '../brief/brief.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import type { Position } from './daylight.ts';
import { type ResolvedClock, resolveClock } from './resolved-clock.ts';

/**
 * The clock by which a brief's schedule is read over one weather year; part of a run's key.
 * @param input.position the place; needed by a schedule of daylight alone
 * @throws RangeError on a zone that is not known, on columns that are no year, and on daylight hours without a position
 */
export function clockOfBrief(input: {
  year: WeatherYear;
  brief: Pick<Brief, 'clock' | 'hours'>;
  zone: string;
  position: Position | null;
}): ResolvedClock {
  const { year, brief, zone, position } = input;
  const { kind, utcOffsetMin } = year;
  const slots = year.packed.flags.length;
  const clock = resolveClock({ zone, kind, year: year.year, slots, utcOffsetMin, clock: brief.clock });
  if (brief.hours !== 'daylight') return clock;
  if (position === null) {
    throw new RangeError('a schedule of daylight hours needs the position of the place, its latitude and longitude');
  }
  const { latitude, longitude } = position;
  return { ...clock, daylightAt: { latitude, longitude } };
}
