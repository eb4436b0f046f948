import { describe, expect, test } from 'vitest';
import { gapCalendar } from '#engine/reduction/gap-calendar.ts';
import { hourFlags } from '#engine/reduction/hour-flags.ts';
import { fillLongGaps } from '#engine/weather-files/assembly/fill-long-gaps.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { epwBytes } from '../../../support/epw-text.ts';
import { findingsOf, readUsable } from '../../../support/readings.ts';

/** A day that comes again, on a level that rises by 0.1 an hour: what the rule assumes of weather, so that it must be exact. */
const value = (slot: number) => 10 * Math.sin((2 * Math.PI * slot) / 24) + 0.1 * slot;

function columnWithGap(start: number, hours: number): Float64Array {
  const column = Float64Array.from({ length: 8760 }, (_none, slot) => value(slot));
  return column.fill(Number.NaN, start, start + hours);
}

describe('long gaps, where a person asks for it', () => {
  test.each([6, 23, 24, 25, 47])('of %d hours follow the days before and after and meet both ends', (hours) => {
    const column = columnWithGap(4000, hours);
    const filled = fillLongGaps(column, false);
    for (let slot = 4000; slot < 4000 + hours; slot++) expect(column[slot], String(slot)).toBeCloseTo(value(slot), 9);
    expect(filled.reduce((sum, one) => sum + one, 0)).toBe(hours);
  });

  test.each([
    ['of 5 hours, which rule 1 fills', 4000, 5],
    ['of 48 hours', 4000, 48],
    ['at the beginning of the year', 0, 10],
    ['at its end', 8750, 10],
    ['so near to it that the day before is not there', 10, 10],
  ] as const)('are left missing: %s', (_name, start, hours) => {
    const column = columnWithGap(start, hours);
    expect(fillLongGaps(column, false).includes(1)).toBe(false);
    expect(Number.isNaN(column[start])).toBe(true);
  });

  test('are not filled across the joint of two months of a typical year, nor from values that were filled themselves', () => {
    const joint = 31 * 24;
    expect(fillLongGaps(columnWithGap(joint - 5, 10), true).includes(1)).toBe(false);
    expect(fillLongGaps(columnWithGap(joint - 5, 10), false).includes(1)).toBe(true);
    const twice = columnWithGap(4000, 8).fill(Number.NaN, 4024, 4032);
    expect(fillLongGaps(twice, false).subarray(4000, 4032).includes(1)).toBe(false);
  });

  test('are filled in a file only when it is asked for, are marked as repaired and told', () => {
    const bytes = epwBytes({
      hour: ({ slot }) =>
        slot >= 4000 && slot < 4030 ? { dryBulbC: '99.9', dewPointC: '99.9', relativeHumidityPct: 999 } : {},
    });
    const left = readWeatherFile(bytes, 'made-up.epw');
    const filled = readWeatherFile(bytes, 'made-up.epw', { fillLongGaps: true });
    if (left.status === 'refused' || left.hours === null || filled.status === 'refused' || filled.hours === null) {
      throw new Error('not read');
    }
    expect(Number.isNaN(left.hours.dryBulbC[4010])).toBe(true);
    expect(findingsOf(left, 'time-gap')[0]?.message).toContain('They stay missing');
    expect(filled.hours.flags.subarray(4000, 4030).every((flags) => flags === (2 | (2 << 2)))).toBe(true);
    expect(findingsOf(filled, 'time-gap')[0]?.message).toContain('They are filled from the days before and after');
    const plain = readUsable({});
    for (const slot of [4000, 4015, 4029]) {
      expect(Math.abs((filled.hours.dryBulbC[slot] ?? 0) - (plain.hours.dryBulbC[slot] ?? 0))).toBeLessThan(1.5);
      const ratio = (filled.hours.humidityRatio[slot] ?? 0) / (plain.hours.humidityRatio[slot] ?? 1);
      expect(Math.abs(ratio - 1)).toBeLessThan(0.15);
    }
  });
});

describe('the gap calendar', () => {
  test('counts each hour of a day once, missing before repaired before estimated', () => {
    const flags = new Uint8Array(8760);
    const good = { dryBulb: 'measured', humidity: 'measured', pressure: 'measured' } as const;
    flags.fill(hourFlags({ ...good, humidity: 'missing', dryBulb: 'repaired' }), 24, 30);
    flags.fill(hourFlags({ ...good, pressure: 'repaired', dryBulb: 'estimated' }), 30, 35);
    flags.fill(hourFlags({ ...good, dryBulb: 'estimated' }), 40, 44);
    flags.fill(hourFlags({ ...good, pressure: 'estimated' }), 44, 48);
    const calendar = gapCalendar(flags);
    expect([calendar.missing.length, calendar.missing[1], calendar.repaired[1], calendar.estimated[1]]).toEqual([
      365, 6, 5, 4,
    ]);
    expect([calendar.missing[0], calendar.repaired[0], calendar.estimated[2]]).toEqual([0, 0, 0]);
    expect(gapCalendar(new Uint8Array(8784)).missing).toHaveLength(366);
  });

  test('of a reading says where its hours are missing', () => {
    const { gaps } = readUsable({
      hour: ({ slot }) => (slot >= 240 && slot < 250 ? { dryBulbC: '99.9' } : slot === 480 ? { dryBulbC: '99.9' } : {}),
    });
    expect(gaps.missing[10]).toBe(10);
    expect(gaps.missing.reduce((sum, hours) => sum + hours, 0)).toBe(10);
    expect(gaps.repaired[20]).toBe(1);
  });
});
