import { describe, expect, test } from 'vitest';
import { openSlots } from '#engine/clock/open-slots.ts';
import { resolveClock } from '#engine/clock/resolved-clock.ts';

const office = { months: 'all', weekdays: 'mon-fri', hours: '8-18' } as const;

function clockOf(zone: string, utcOffsetMin: number, clock: 'civil' | 'standard' = 'civil') {
  return resolveClock({ kind: 'typical', year: null, slots: 8760, zone, utcOffsetMin, clock });
}

/** Hours ending, 1..24, of the open slots of a day of the year, 1 first, in the slots' standard time. */
function openHours(open: Uint8Array, dayOfYear: number): number[] {
  const first = (dayOfYear - 1) * 24;
  return [...open.subarray(first, first + 24)].flatMap((value, hour) => (value === 1 ? [hour + 1] : []));
}

const NINE_TO_EIGHTEEN = [9, 10, 11, 12, 13, 14, 15, 16, 17, 18];

describe('open slots', () => {
  test('08 to 18 opens the slots that end at 9 to 18, Monday to Friday', () => {
    const open = openSlots(office, clockOf('America/Phoenix', -420));
    expect(openHours(open, 1)).toEqual(NINE_TO_EIGHTEEN);
    expect(openHours(open, 5)).toEqual(NINE_TO_EIGHTEEN);
    expect(openHours(open, 6)).toEqual([]);
    expect(openHours(open, 7)).toEqual([]);
    // 261 weekdays in 2029 (it starts and ends on a Monday) of 10 hours.
    expect(open.reduce((sum, value) => sum + value, 0)).toBe(2610);
  });

  test('in daylight saving time civil 08 to 18 is an hour earlier by the slots', () => {
    const open = openSlots(office, clockOf('America/New_York', -300));
    expect(openHours(open, 60)).toEqual(NINE_TO_EIGHTEEN);
    expect(openHours(open, 183)).toEqual([8, 9, 10, 11, 12, 13, 14, 15, 16, 17]);
    const standard = openSlots(office, clockOf('America/New_York', -300, 'standard'));
    expect(openHours(standard, 183)).toEqual(NINE_TO_EIGHTEEN);
  });

  test('half an hour off the slots, the end of a slot decides', () => {
    // A file in +05:00 for a place in +05:30: its slots end at half past civil hours.
    const open = openSlots(office, clockOf('Asia/Kolkata', 300));
    expect(openHours(open, 1)).toEqual([8, 9, 10, 11, 12, 13, 14, 15, 16, 17]);
  });

  test('day and night opens every slot, whatever the clock', () => {
    for (const zone of ['America/New_York', 'Australia/Lord_Howe', 'Pacific/Chatham']) {
      const open = openSlots({ months: 'all', weekdays: 'all', hours: '0-24' }, clockOf(zone, 0));
      expect(open.every((value) => value === 1)).toBe(true);
    }
  });

  test('months are civil months: the last hour of March before midnight standard is April in summer time', () => {
    const open = openSlots({ months: [4], weekdays: 'all', hours: '0-24' }, clockOf('Europe/Rome', 60));
    expect(openHours(open, 90)).toEqual([24]);
    expect(openHours(open, 120)).toEqual(Array.from({ length: 23 }, (_, hour) => hour + 1));
  });

  test('an office in a file of another offset opens at the same instants', () => {
    const own = openSlots(office, clockOf('Asia/Shanghai', 480));
    const inUtc = openSlots(office, clockOf('Asia/Shanghai', 0));
    // Eight hours later by the clock of the file: slot i of the one is slot i - 8 of the other.
    expect(inUtc.subarray(0, 8752)).toEqual(own.subarray(8));
  });

  test('daylight hours are refused until they are built', () => {
    expect(() => openSlots({ ...office, hours: 'daylight' }, clockOf('UTC', 0))).toThrow(/daylight/);
  });
});
