import { describe, expect, it } from 'vitest';
import { dayLabel, hourLabel, monthStarts } from '../../../src/charts/calendar.ts';

describe('the calendar of a weather year', () => {
  it('names each day as a calendar does, in an ordinary and in a leap year', () => {
    for (const [days, year] of [
      [365, 2029],
      [366, 2024],
    ] as const) {
      for (let day = 0; day < days; day += 1) {
        // The outside truth is the JavaScript calendar, read in UTC so that the zone of the test does not matter.
        const date = new Date(Date.UTC(year, 0, 1 + day));
        const month = date.toLocaleString('en', { month: 'short', timeZone: 'UTC' });
        expect(dayLabel(day, days)).toBe(`${date.getUTCDate()} ${month}`);
      }
    }
  });

  it('starts March a day later in a leap year', () => {
    expect(monthStarts(365)[2]).toBe(59);
    expect(monthStarts(366)[2]).toBe(60);
  });

  it('refuses a day outside the year', () => {
    expect(() => dayLabel(365, 365)).toThrow('Day 365 is outside a year of 365 days.');
  });

  it('names an hour by the clock at its two ends', () => {
    expect(hourLabel(1)).toBe('00:00 to 01:00');
    expect(hourLabel(24)).toBe('23:00 to 24:00');
  });
});
