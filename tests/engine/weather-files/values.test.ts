import { describe, expect, test } from 'vitest';
import {
  humidityRatioFromDewPoint,
  humidityRatioFromRelativeHumidity,
  relativeHumidityOfDewPointPct,
} from '#engine/psychrometrics/moist-air.ts';
import { standardPressurePa, stationPressurePa } from '#engine/psychrometrics/pressure.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { type EpwDate, type EpwHour, plainHour } from '../../support/epw-text.ts';
import { findingsOf, readRefused, readUsable, remarkable } from '../../support/readings.ts';

/** What the given slots hold; every other hour is plain. */
const only = (slots: readonly number[], hour: EpwHour) => ({
  hour: ({ slot }: EpwDate) => (slots.includes(slot) ? hour : {}),
});
const span = (from: number, to: number) => Array.from({ length: to - from }, (_none, index) => from + index);

describe('gaps', () => {
  test('of at most five hours are filled in a straight line, of six they stay; humidity likewise', () => {
    const reading = readUsable({
      hour: ({ slot }) => {
        if (span(1000, 1005).includes(slot)) return { dryBulbC: '99.9', dewPointC: '99.9', relativeHumidityPct: 999 };
        if (span(2000, 2006).includes(slot)) return { dryBulbC: '99.9', dewPointC: '99.9', relativeHumidityPct: 999 };
        return {};
      },
    });
    const { dryBulbC, flags, humidityRatio } = reading.hours;
    for (const column of [dryBulbC, humidityRatio]) {
      const [before = 0, after = 0] = [column[999], column[1005]];
      for (let step = 1; step <= 5; step++)
        expect(column[999 + step]).toBeCloseTo(before + ((after - before) * step) / 6, 9);
      expect(column.subarray(2000, 2006).every((value) => Number.isNaN(value))).toBe(true);
    }
    expect(flags[1002]).toBe(2 | (2 << 2));
    expect(flags[2002]).toBe(3 | (3 << 2));
  });

  test('are not filled across a month joint of a typical year, but they are in an actual one', () => {
    const joint = 31 * 24;
    const hole = only([joint - 1, joint], { dryBulbC: '99.9' });
    expect(Number.isNaN(readUsable(hole).hours.dryBulbC[joint])).toBe(true);
    const actual = readUsable({ hour: (date) => ({ ...hole.hour(date), year: 2017 }) });
    expect(actual.kind).toBe('actual');
    expect(Number.isNaN(actual.hours.dryBulbC[joint])).toBe(false);
  });

  test('are not filled from the end of the year to its beginning', () => {
    const { dryBulbC } = readUsable(only([0, 8759], { dryBulbC: '99.9' })).hours;
    expect([dryBulbC[0], dryBulbC[8759]]).toEqual([Number.NaN, Number.NaN]);
  });

  test('over a tenth of the year filled is a doubt, and over 35 % withholds annual figures', () => {
    const everyThird = readUsable({ hour: ({ slot }) => (slot % 3 === 1 ? { dryBulbC: '99.9' } : {}) });
    expect(findingsOf(everyThird, 'much-repaired')[0]).toMatchObject({ severity: 'doubt', count: 2920 });
    const everySecond = readUsable({ hour: ({ slot }) => (slot % 2 === 1 ? { dryBulbC: '99.9' } : {}) });
    expect(findingsOf(everySecond, 'much-repaired')[0]?.message).toMatch(/50 % .* annual figures are withheld/);
  });
});

describe('impossible values', () => {
  test.each([
    ['dryBulbC', 60.1],
    ['dryBulbC', -90.1],
    ['dewPointC', 37.1],
    ['dewPointC', -100.1],
  ] as const)('%s of %d °C is left out with a doubt and its line', (column, value) => {
    const reading = readUsable(only([5000], { [column]: value, relativeHumidityPct: 50 }));
    expect(findingsOf(reading, 'range')).toEqual([
      expect.objectContaining({ severity: 'doubt', line: 5009, count: 1 }),
    ]);
    expect(reading.hours.flags[5000]).toBe(column === 'dryBulbC' ? 2 : 2 << 2);
  });

  test('a year in Fahrenheit is refused with the guess', () => {
    const reading = readRefused({
      hour: (date) => {
        const { dewPointC, dryBulbC } = plainHour(date);
        const rh = relativeHumidityOfDewPointPct(dryBulbC, dewPointC, 'water').toFixed(1);
        return { dryBulbC: 32 + 1.8 * dryBulbC, dewPointC: 32 + 1.8 * dewPointC, relativeHumidityPct: rh };
      },
    });
    expect(findingsOf(reading, 'unit-guess')[0]).toMatchObject({ severity: 'refuse' });
    expect(findingsOf(reading, 'unit-guess')[0]?.message).toContain('Fahrenheit');
  });

  test('a file without any dry bulb, or without any humidity, is refused and says what is missing', () => {
    const noDryBulb = readRefused({ hour: () => ({ dryBulbC: '99.9' }) });
    expect(findingsOf(noDryBulb, 'no-temperature')[0]).toMatchObject({ severity: 'refuse', count: 8760 });
    const noHumidity = readRefused({ hour: () => ({ dewPointC: '99.9', relativeHumidityPct: 999 }) });
    expect(findingsOf(noHumidity, 'no-humidity')[0]).toMatchObject({ severity: 'refuse' });
  });
});

describe('humidity', () => {
  test('comes from the dew point where both agree, from relative humidity where there is no dew point', () => {
    const fromDew = readUsable({});
    expect(fromDew.humidityFrom).toBe('dew point');
    const plain = plainHour({ slot: 100, month: 1, day: 5, hour: 5 });
    const pressurePa = fromDew.hours.pressurePa[100] ?? 0;
    expect(fromDew.hours.humidityRatio[100]).toBe(
      humidityRatioFromDewPoint({ ...plain, pressurePa, belowZero: 'water' }),
    );
    const fromRh = readUsable({ hour: () => ({ dewPointC: '99.9', relativeHumidityPct: 40 }) });
    expect(fromRh.humidityFrom).toBe('relative humidity');
    expect(fromRh.hours.humidityRatio[100]).toBe(
      humidityRatioFromRelativeHumidity({ ...plain, relativeHumidityPct: 40, pressurePa, belowZero: 'water' }),
    );
  });

  test('is one column for the whole file: a dew point that lacks in over 2 % of the hours gives way to relative humidity', () => {
    const reading = readUsable({
      hour: (date) => {
        const { dewPointC, dryBulbC } = plainHour(date);
        const rh = relativeHumidityOfDewPointPct(dryBulbC, dewPointC, 'water').toFixed(1);
        return date.slot % 20 === 0 ? { dewPointC: '99.9', relativeHumidityPct: rh } : {};
      },
    });
    expect(reading.humidityFrom).toBe('relative humidity');
    expect(remarkable(reading)).toEqual([]);
  });

  test('that disagrees in 2 to 50 % of the hours is a doubt that says both annual results', () => {
    const disagreeing = (limit: number) => readUsable(only(span(0, limit), { relativeHumidityPct: 95 }));
    expect(remarkable(disagreeing(175))).toEqual([]);
    const reading = disagreeing(400);
    expect(findingsOf(reading, 'rh-dew-disagree')[0]).toMatchObject({ severity: 'doubt', line: 9, count: 400 });
    expect(findingsOf(reading, 'rh-dew-disagree')[0]?.message).toMatch(
      /by the dew point and \d+\.\d\d °C by the relative humidity/,
    );
    expect(reading.humidityFrom).toBe('dew point');
  });

  test('column of dew points that holds the wet bulb is recognised, asked about and proposed', () => {
    const reading = readUsable({
      hour: (date) => {
        const { dewPointC, dryBulbC, pressurePa } = plainHour(date);
        const ratio = humidityRatioFromDewPoint({ dryBulbC, dewPointC, pressurePa, belowZero: 'water' });
        const rh = relativeHumidityOfDewPointPct(dryBulbC, dewPointC, 'water').toFixed(0);
        return { dewPointC: wetBulbC(dryBulbC, ratio, pressurePa).toFixed(1), relativeHumidityPct: rh };
      },
    });
    expect(reading.status).toBe('asks');
    expect(reading.asks).toEqual([
      expect.objectContaining({ what: 'dew-is-wet-bulb', proposal: 'Read the dew-point column as wet bulb.' }),
    ]);
    const unrelated = readUsable({ hour: ({ slot }) => ({ relativeHumidityPct: slot % 2 === 0 ? 99 : 3 }) });
    expect(unrelated.asks).toEqual([
      expect.objectContaining({ what: 'dew-is-wet-bulb', proposal: 'Use the relative humidity.' }),
    ]);
  });

  test('a dew point up to 0.5 K above the dry bulb is lowered to it; more is left out and filled', () => {
    const slight = readUsable(only([100], { dryBulbC: 5, dewPointC: 5.5 }));
    expect(findingsOf(slight, 'dew-above-dry')).toEqual([
      expect.objectContaining({ severity: 'repair', line: 109, count: 1 }),
    ]);
    expect(slight.hours.flags[100]).toBe(2 << 2);
    const { dryBulbC, humidityRatio, pressurePa } = slight.hours;
    expect(wetBulbC(dryBulbC[100] ?? 0, humidityRatio[100] ?? 0, pressurePa[100] ?? 0)).toBe(5);
    const far = readUsable(only([100], { dryBulbC: 5, dewPointC: 5.6 }));
    expect(findingsOf(far, 'dew-above-dry')).toEqual([
      expect.objectContaining({ severity: 'doubt', line: 109, count: 1 }),
    ]);
    expect(far.hours.dryBulbC[100]).toBe(5);
    expect(far.hours.flags[100]).toBe(2 << 2);
  });

  test('dew points above the dry bulb in a fifth of a month take the month with them; in over 1 % of the year they refuse', () => {
    const start = 31 * 24;
    const february = (hours: number) => ({
      hour: (date: EpwDate) =>
        date.slot >= start && date.slot < start + hours
          ? { dewPointC: plainHour(date).dryBulbC + 7, relativeHumidityPct: '' }
          : { relativeHumidityPct: '' },
    });
    expect(findingsOf(readRefused(february(88)), 'dew-above-dry').some(({ severity }) => severity === 'refuse')).toBe(
      true,
    );
    const few = readUsable(february(87));
    expect(findingsOf(few, 'dew-above-dry').every(({ severity }) => severity === 'doubt')).toBe(true);
    // Relative humidity that is there and agrees elsewhere serves in place of a dew point that is unfit.
    const rescued = readUsable({
      hour: (date) =>
        date.slot >= start && date.slot < start + 140
          ? { dewPointC: plainHour(date).dryBulbC + 7, relativeHumidityPct: 60 }
          : {},
    });
    expect(rescued.humidityFrom).toBe('relative humidity');
    expect(findingsOf(rescued, 'dew-above-dry').some(({ message }) => message.includes('In February'))).toBe(true);
  });

  test('relative humidity of 101 to 105 % is 100, more is left out', () => {
    const reading = readUsable({
      hour: ({ slot }) => ({ dewPointC: '', relativeHumidityPct: slot === 10 ? 104 : slot === 20 ? 179 : 40 }),
    });
    expect(findingsOf(reading, 'rh-over-100').map(({ line, severity }) => [line, severity])).toEqual([
      [19, 'repair'],
      [29, 'repair'],
    ]);
    const { dryBulbC, flags, humidityRatio, pressurePa } = reading.hours;
    expect(wetBulbC(dryBulbC[10] ?? 0, humidityRatio[10] ?? 0, pressurePa[10] ?? 0)).toBe(dryBulbC[10]);
    expect([flags[10], flags[20]]).toEqual([2 << 2, 2 << 2]);
  });

  const cold = (phase: 'water' | 'ice', off = 0) => ({
    hour: ({ slot }: EpwDate) => {
      const dryBulbC = 6 + (slot % 10);
      const dewPointC = -8 - (slot % 7);
      const rh = (relativeHumidityOfDewPointPct(dryBulbC, dewPointC, phase) + off).toFixed(1);
      return { dryBulbC, dewPointC, relativeHumidityPct: rh };
    },
  });

  test.each(['water', 'ice'] as const)('below 0 °C that stands for %s is found by test', (phase) => {
    const reading = readUsable(cold(phase));
    expect(reading.belowZero).toBe(phase);
    expect(findingsOf(reading, 'below-zero-phase')).toEqual([]);
    const state = { dryBulbC: 6, dewPointC: -8, pressurePa: reading.hours.pressurePa[0] ?? 0, belowZero: phase };
    expect(reading.hours.humidityRatio[0]).toBe(humidityRatioFromDewPoint(state));
  });

  test('below 0 °C that cannot be told is water, with a note', () => {
    for (const options of [cold('ice', 4), {}, { hour: () => ({ relativeHumidityPct: '' }) }]) {
      const reading = readUsable(options);
      expect(reading.belowZero).toBe('water');
      expect(findingsOf(reading, 'below-zero-phase')[0]?.severity).toBe('note');
    }
  });
});

describe('pressure', () => {
  test('more than 6 % from the median is replaced by it, run by run with lines', () => {
    const reading = readUsable(only([303, 304, 900], { pressurePa: 68_500 }));
    expect(findingsOf(reading, 'pressure-range')).toEqual([
      expect.objectContaining({ severity: 'repair', line: 312, lastLine: 313, count: 2 }),
      expect.objectContaining({ severity: 'repair', line: 909, count: 1 }),
    ]);
    expect(Math.abs((reading.hours.pressurePa[303] ?? 0) - 97_300)).toBeLessThan(20);
    expect(reading.hours.flags[303]).toBe(2 << 4);
  });

  test('that the file lacks is the standard atmosphere at the elevation, marked as assumed', () => {
    const reading = readUsable({ hour: () => ({ pressurePa: 999_999 }) });
    expect(findingsOf(reading, 'pressure-assumed')[0]).toMatchObject({ severity: 'note', count: 8760 });
    expect(reading.hours.pressurePa[4000]).toBe(standardPressurePa(337));
    expect(reading.hours.flags[4000]).toBe(1 << 4);
  });

  test('that lacks together with the elevation is asked about, and nothing is assumed', () => {
    const reading = readUsable({
      location: 'Made-up Field,-,Nowhere,Invented,-,33.45,-111.98,-7.0,',
      hour: () => ({ pressurePa: 999_999 }),
    });
    expect(reading.asks).toEqual([expect.objectContaining({ what: 'elevation-missing' })]);
    expect(reading.station.elevationM).toBeNull();
    expect(reading.hours.pressurePa.every((value) => Number.isNaN(value))).toBe(true);
    expect(reading.hours.dryBulbC.every((value) => !Number.isNaN(value))).toBe(true);
  });

  test('without an elevation serves by itself, with a doubt', () => {
    const reading = readUsable({ location: 'Made-up Field,-,Nowhere,Invented,-,33.45,-111.98,-7.0,9999.9' });
    expect(findingsOf(reading, 'elevation-missing')).toEqual([expect.objectContaining({ severity: 'doubt' })]);
    expect(reading.status).toBe('review');
  });

  test.each([
    [1.0, []],
    [2.0, ['pressure-elevation note']],
    [-2.0, ['pressure-elevation note']],
    [-4.0, ['pressure-elevation ask']],
  ] as const)('%d %% off the standard atmosphere of the elevation gives %j', (pct, expected) => {
    const pressurePa = Math.round(standardPressurePa(337) * (1 + pct / 100));
    const reading = readUsable({ hour: ({ slot }) => ({ pressurePa: pressurePa + (slot % 3) }) });
    expect(remarkable(reading)).toEqual(expected);
  });

  test('of sea level at 600 m is asked about, with the conversion proposed', () => {
    const reading = readUsable({
      location: 'High Field,-,-,-,-,33.45,-111.98,-7.0,600',
      hour: ({ slot }) => ({ pressurePa: 101_300 + (slot % 40) }),
    });
    expect(reading.asks).toEqual([
      expect.objectContaining({ what: 'pressure-sea-level', proposal: 'Convert it to station pressure at 600 m.' }),
    ]);
    // What the conversion would give is right for the elevation to 1 %.
    const convertedPa = stationPressurePa({ seaLevelPressurePa: 101_320, dryBulbC: 25, elevationM: 600 });
    expect(Math.abs(convertedPa / standardPressurePa(600) - 1)).toBeLessThan(0.01);
  });

  test('of one value in 8000 hours is noted and marked as assumed', () => {
    const reading = readUsable({ hour: ({ slot }) => ({ pressurePa: slot < 8000 ? 97_000 : 97_100 }) });
    expect(findingsOf(reading, 'pressure-constant')[0]).toMatchObject({ severity: 'note', count: 8000 });
    expect([reading.hours.flags[0], reading.hours.flags[8759]]).toEqual([1 << 4, 0]);
  });

  test('in hectopascals is asked about', () => {
    const reading = readUsable({ hour: (date) => ({ pressurePa: plainHour(date).pressurePa / 100 }) });
    expect(reading.asks[0]).toMatchObject({
      what: 'unit-guess',
      proposal: expect.stringContaining('multiply it by 100'),
    });
  });
});

describe('place', () => {
  const place = (latitude: string, longitude: string, zone: string) =>
    readUsable({ location: `Made-up Field,-,Nowhere,Invented,-,${latitude},${longitude},${zone},337` });

  test('whose zone fits its longitude is not remarked, from Nepal to Newfoundland', () => {
    for (const [latitude, longitude, zone] of [
      ['27.7', '85.4', '5.75'],
      ['47.6', '-52.7', '-3.5'],
      ['-17.7', '-178', '-12'],
      ['-13.8', '-172', '-11'],
    ] as const) {
      expect(remarkable(place(latitude, longitude, zone))).toEqual([]);
    }
    expect(place('27.7', '85.4', '5.75').station.utcOffsetH).toBe(5.75);
  });

  test('whose zone does not fit is a doubt; where the other sign of the longitude fits it is asked', () => {
    expect(remarkable(place('45', '-45', '-7'))).toEqual(['place-zone doubt']);
    const flipped = place('33.45', '111.98', '-7');
    expect(flipped.asks).toEqual([
      expect.objectContaining({ what: 'place-sign', proposal: 'The longitude is -111.98.' }),
    ]);
  });

  test('that is no place on Earth is asked about with the likely mending', () => {
    expect(place('-111.98', '33.45', '-7').asks[0]).toMatchObject({
      what: 'place-sign',
      proposal: 'The two are exchanged: latitude 33.45, longitude -111.98.',
    });
    expect(place('33.45', '248.02', '-7').asks[0]).toMatchObject({
      what: 'place-sign',
      proposal: expect.stringContaining('-111.98'),
    });
  });

  test.each([
    ['', '-111.98', '-7', 'latitude'],
    ['north', '-111.98', '-7', 'latitude'],
    ['33', '', '', 'longitude or time zone'],
    ['33.45', '-111.98', '99', 'time zone'],
  ])('of latitude "%s", longitude "%s", zone "%s" is asked for', (latitude, longitude, zone, missing) => {
    const reading = place(latitude, longitude, zone);
    expect(reading.asks[0]).toMatchObject({
      what: 'place-missing',
      message: expect.stringContaining(`no usable ${missing}`),
    });
  });

  test('of 0, 0 is no place', () => {
    expect(place('0', '0', '0').asks[0]?.what).toBe('place-missing');
  });
});
