import { describe, expect, test } from 'vitest';
import { calendarDayMs, resolveClock } from '#engine/clock/resolved-clock.ts';

const typical = { kind: 'typical', year: null, slots: 8760, clock: 'civil' } as const;

/** Slot, 0 first, whose beginning is this hour, 0..23, of a day of the year, 1 first. */
function slotFrom(dayOfYear: number, hour: number): number {
  return (dayOfYear - 1) * 24 + hour;
}

describe('a resolved clock', () => {
  test('a typical year is laid on 2029, one with 29 February on 2024, an actual year on its own', () => {
    const zone = 'UTC';
    const utc = { zone, utcOffsetMin: 0 };
    expect(resolveClock({ ...typical, ...utc }).calendarYear).toBe(2029);
    expect(resolveClock({ ...typical, ...utc, slots: 8784 }).calendarYear).toBe(2024);
    expect(resolveClock({ ...typical, ...utc, kind: 'actual', year: 2011 }).calendarYear).toBe(2011);
    expect(resolveClock({ ...typical, ...utc, kind: 'derived' }).calendarYear).toBe(2029);
  });

  test('2029 and 2024 start on a Monday, so that places compare', () => {
    const starts = [8760, 8784].map((slots) =>
      calendarDayMs(resolveClock({ ...typical, zone: 'UTC', utcOffsetMin: 0, slots }), 0),
    );
    expect(starts.map((ms) => new Date(ms).getUTCDay())).toEqual([1, 1]);
  });

  // Rules of the United States since 2007: second Sunday of March 02:00 to first Sunday of November 02:00 civil time.
  test('New York goes ahead on 11 March 2029 at 02:00 and back on 4 November at 01:00 standard time', () => {
    const clock = resolveClock({ ...typical, zone: 'America/New_York', utcOffsetMin: -300 });
    expect(clock.offsets).toEqual([
      { fromSlot: 0, offsetMin: -300 },
      { fromSlot: slotFrom(31 + 28 + 11, 2), offsetMin: -240 },
      { fromSlot: slotFrom(304 + 4, 1), offsetMin: -300 },
    ]);
  });

  // Rules of the European Union: last Sunday of March 01:00 UTC to last Sunday of October 01:00 UTC.
  test('Rome goes ahead on 25 March 2029 and back on 28 October, both at 01:00 UTC', () => {
    const clock = resolveClock({ ...typical, zone: 'Europe/Rome', utcOffsetMin: 60 });
    expect(clock.offsets).toEqual([
      { fromSlot: 0, offsetMin: 60 },
      { fromSlot: slotFrom(31 + 28 + 25, 2), offsetMin: 120 },
      { fromSlot: slotFrom(273 + 28, 2), offsetMin: 60 },
    ]);
  });

  test('a zone south of the equator begins the year ahead', () => {
    const clock = resolveClock({ ...typical, zone: 'Australia/Adelaide', utcOffsetMin: 570 });
    expect(clock.offsets.map(({ offsetMin }) => offsetMin)).toEqual([630, 570, 630]);
  });

  test('Phoenix and standard clocks never change', () => {
    expect(resolveClock({ ...typical, zone: 'America/Phoenix', utcOffsetMin: -420 }).offsets).toEqual([
      { fromSlot: 0, offsetMin: -420 },
    ]);
    const standard = resolveClock({ ...typical, zone: 'America/New_York', utcOffsetMin: -300, clock: 'standard' });
    expect(standard.offsets).toEqual([{ fromSlot: 0, offsetMin: -300 }]);
  });

  test('an actual year without 29 February keeps its dates from March on', () => {
    const clock = resolveClock({ ...typical, kind: 'actual', year: 2020, zone: 'UTC', utcOffsetMin: 0 });
    expect(new Date(calendarDayMs(clock, 58)).toISOString()).toMatch(/^2020-02-28/);
    expect(new Date(calendarDayMs(clock, 59)).toISOString()).toMatch(/^2020-03-01/);
    expect(new Date(calendarDayMs(clock, 364)).toISOString()).toMatch(/^2020-12-31/);
  });

  test('a zone that is not known and a number of slots that is no year are refused', () => {
    expect(() => resolveClock({ ...typical, zone: 'Mars/Olympus', utcOffsetMin: 0 })).toThrow(/Mars\/Olympus/);
    expect(() => resolveClock({ ...typical, zone: 'UTC', utcOffsetMin: 0, slots: 24 })).toThrow(/24/);
  });
});
