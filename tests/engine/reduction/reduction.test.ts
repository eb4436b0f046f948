import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { YearFacts } from '#contract/weather.ts';
import { dewPointC, humidityRatioFromDewPoint } from '#engine/psychrometrics/moist-air.ts';
import { standardPressurePa } from '#engine/psychrometrics/pressure.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import {
  dayOfWeek,
  daysInMonth,
  hasLeapDay,
  monthOfEachSlot,
  monthStartSlots,
  slotDate,
  slotOf,
} from '#engine/reduction/calendar.ts';
import {
  DEPRESSION_BINS,
  depressionHistogram,
  depressionHoursByMonth,
  hoursAtLeast,
} from '#engine/reduction/depression-hours.ts';
import { longestLowDepression } from '#engine/reduction/depression-spell.ts';
import { reachedHundredths } from '#engine/reduction/derived-columns.ts';
import { designValues, valueAtPercent } from '#engine/reduction/design-values.ts';
import { highDewPoints } from '#engine/reduction/high-dew-points.ts';
import { hourFlags } from '#engine/reduction/hour-flags.ts';
import { usableFor } from '#engine/reduction/month-completeness.ts';
import {
  packedBytes,
  packedFromBytes,
  packYear,
  unpackYear,
  type YearColumns,
  yearColumns,
} from '#engine/reduction/packed-columns.ts';
import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import { countHours, depressionCurve } from '#engine/reduction/year-summary.ts';
import { ruleNames } from '#engine/weather-files/quality/quality-options.ts';
import { type EpwOptions, epwDates } from '../../support/epw-text.ts';
import { readUsable } from '../../support/readings.ts';
import { sameColumns } from '../../support/same-values.ts';
import { propertySettings } from '../../support/sample-size.ts';

/** The file of `epw-text.ts` as it is, read and reduced once. */
let ordinary: ReducedYear | undefined;
const reduce = (options: EpwOptions = {}) => reduceYear(readUsable(options));
const reduceOrdinary = () => {
  ordinary ??= reduce();
  return ordinary;
};
/** Weather that no sensor reports, which the tests of hours would leave out. */
const reduceUntested = (options: EpwOptions) => reduceYear(readUsable(options, { rulesOff: ruleNames }));

describe('calendar', () => {
  test('every slot has its date and every date its slot, with and without 29 February', () => {
    for (const slots of [8760, 8784]) {
      const months = monthOfEachSlot(slots);
      for (const { slot, ...date } of epwDates(slots)) {
        if (slot % 97 !== 0 && date.hour !== 24) continue;
        expect(slotDate(slot, slots)).toEqual(date);
        expect(slotOf(date, slots)).toBe(slot);
        expect(months[slot]).toBe(date.month);
      }
      expect(monthStartSlots(slots).at(-1)).toBe(slots);
    }
    expect(slotOf({ month: 2, day: 29, hour: 1 }, 8784)).toBe(1416);
    expect(slotOf({ month: 2, day: 29, hour: 1 }, 8760)).toBeNull();
    expect(slotOf({ month: 1, day: 1, hour: 0 }, 8760)).toBeNull();
    expect(slotOf({ month: 13, day: 1, hour: 1 }, 8760)).toBeNull();
    expect(() => hasLeapDay(8761)).toThrow(/8760 or 8784 slots, not 8761/);
    expect(() => slotDate(8760, 8760)).toThrow(RangeError);
    expect([daysInMonth(2, true), daysInMonth(2, false), daysInMonth(0, true)]).toEqual([29, 28, 0]);
  });

  test('weekdays are those of the calendar of the language from 1900 to 2100', () => {
    for (let year = 1900; year <= 2100; year++) {
      for (const [month, day] of [
        [1, 1],
        [2, 28],
        [3, 1],
        [12, 31],
      ] as const) {
        expect(dayOfWeek(year, month, day)).toBe(new Date(Date.UTC(year, month - 1, day)).getUTCDay());
      }
    }
  });
});

describe('packed columns', () => {
  const value = (low: number, high: number) =>
    fc.oneof(fc.double({ min: low, max: high, noNaN: true }), fc.constant(Number.NaN));

  test('keep each value to half a step, missing as missing, and survive bytes unchanged', () => {
    const hour = fc.record({
      dryBulbC: value(-90, 60),
      humidityRatio: value(0, 0.13),
      pressurePa: value(31_000, 110_000),
    });
    const property = fc.property(fc.array(hour, { minLength: 1, maxLength: 30 }), (hours) => {
      const column = (of: (hour: (typeof hours)[number]) => number) =>
        Float64Array.from({ length: 8760 }, (_none, slot) => of(hours[slot % hours.length] ?? hour0));
      const columns = {
        dryBulbC: column((each) => each.dryBulbC),
        humidityRatio: column((each) => each.humidityRatio),
        pressurePa: column((each) => each.pressurePa),
      };
      const packed = packYear({ ...columns, flags: new Uint8Array(8760).fill(9) });
      const back = packedFromBytes(packedBytes(packed));
      expect(sameColumns({ ...back }, { ...packed })).toBe(true);
      const unpacked = unpackYear(back);
      for (const [name, half] of [
        ['dryBulbC', 0.005],
        ['humidityRatio', 1e-6],
        ['pressurePa', 1],
      ] as const) {
        for (let slot = 0; slot < hours.length; slot++) {
          const [was, is] = [columns[name][slot] ?? 0, unpacked[name][slot] ?? 0];
          expect(Number.isNaN(is)).toBe(Number.isNaN(was));
          if (!Number.isNaN(was)) expect(Math.abs(is - was)).toBeLessThanOrEqual(half * (1 + 1e-6));
        }
      }
    });
    fc.assert(property, propertySettings(10));
  });

  const hour0 = { dryBulbC: 0, humidityRatio: 0, pressurePa: 0 };

  test('are little-endian, with the missing values of the conventions', () => {
    const packed = packYear({
      dryBulbC: new Float64Array(8760).fill(Number.NaN).fill(-0.02, 1, 2).fill(2.57, 2, 3),
      humidityRatio: new Float64Array(8760).fill(Number.NaN).fill(0.5, 1, 2).fill(514e-6, 2, 3),
      pressurePa: new Float64Array(8760).fill(Number.NaN).fill(101_325, 1, 2),
      flags: new Uint8Array(8760),
    });
    const bytes = packedBytes(packed);
    expect([...bytes.dryBulb.subarray(0, 6)]).toEqual([0x00, 0x80, 0xfe, 0xff, 0x01, 0x01]);
    // A humidity ratio beyond the column is set to its end, not to the missing value.
    expect([...bytes.humidityRatio.subarray(0, 6)]).toEqual([0xff, 0xff, 0xfe, 0xff, 0x01, 0x01]);
    // 101325 Pa is 50662.5 steps: halves upwards.
    expect([...bytes.pressure.subarray(0, 4)]).toEqual([0xff, 0xff, 50_663 & 0xff, 50_663 >> 8]);
  });

  test('of wrong lengths are refused with what was found and what is wanted', () => {
    const bytes = packedBytes(reduceOrdinary().year.packed);
    expect(() => packedFromBytes({ ...bytes, pressure: bytes.pressure.subarray(2) })).toThrow(
      /17520, 17520, 17518 and 8760 bytes, expected 2, 2, 2 and 1/,
    );
  });
});

describe('depression hours', () => {
  test('fall into bins by the hundredths that they reach, and a tie is met', () => {
    const depressionK = Float64Array.of(0, 0.004, 3.98, 3.9956, 4, 3.99999, 12.3456, Number.NaN, -1e-9);
    // 3.99999 lies within the 0.0005 K to which the wet bulb is found; 3.9956 does not.
    expect([...reachedHundredths(depressionK)]).toEqual([0, 0, 398, 399, 400, 400, 1234, -1, 0]);
  });

  test('are counted by month, hour of day and bin, and add up to the known hours', () => {
    const depression = new Int32Array(8760).fill(-1);
    depression[0] = 0;
    depression[743] = 399;
    depression[744] = 400;
    depression[8759] = 9900;
    const histogram = depressionHistogram(depression);
    expect(histogram).toHaveLength(12 * 24 * 64);
    expect(histogram[0]).toBe(1);
    expect(histogram[23 * DEPRESSION_BINS + 3]).toBe(1);
    expect(histogram[24 * DEPRESSION_BINS + 4]).toBe(1);
    expect(histogram[(11 * 24 + 23) * DEPRESSION_BINS + 63]).toBe(1);
    const byMonth = depressionHoursByMonth(depression);
    expect(byMonth).toHaveLength(12 * DEPRESSION_BINS);
    const counted = [...byMonth.entries()].filter(([, hours]) => hours > 0);
    // Months 1, 1, 2 and 12; bins 0, 3, 4 and the last.
    expect(counted).toEqual([0, 3, DEPRESSION_BINS + 4, 12 * DEPRESSION_BINS - 1].map((place) => [place, 1]));
    const atLeast = hoursAtLeast(depression);
    expect(atLeast.map(({ atLeastK }) => atLeastK)).toEqual(Array.from({ length: 25 }, (_none, index) => index + 1));
    expect([atLeast[2], atLeast[3]]).toEqual([
      { atLeastK: 3, hours: 3, scaledHours: null },
      { atLeastK: 4, hours: 2, scaledHours: null },
    ]);
  });

  test('of a file that lacks most nights are scaled by month and hour of day, so that it looks no drier', () => {
    // 10 K in the twelve hours of the day, 1 K at night; every night but one of each month is unknown.
    const full = new Int32Array(8760);
    const lacking = new Int32Array(8760);
    for (const { day, hour, slot } of epwDates()) {
      const value = hour > 6 && hour <= 18 ? 1000 : 100;
      full[slot] = value;
      lacking[slot] = value === 100 && day > 1 ? -1 : value;
    }
    expect(hoursAtLeast(full)[9]).toEqual({ atLeastK: 10, hours: 4380, scaledHours: 4380 });
    const scaled = hoursAtLeast(lacking)[0];
    expect(scaled?.hours).toBe(4380 + 12 * 12);
    expect(scaled?.scaledHours).toBeCloseTo(8760, 6);
  });
});

describe('design values', () => {
  test('stand at place floor(p N) counted from 0 downwards', () => {
    const downwards = Array.from({ length: 8760 }, (_none, index) => 8760 - index);
    for (const [percent, place] of [
      [0.4, 35],
      [1, 87],
      [2, 175],
      [5, 438],
      [10, 876],
    ] as const) {
      expect(valueAtPercent(downwards, percent)).toBe(downwards[place]);
    }
    expect(() => valueAtPercent([], 1)).toThrow(RangeError);
  });

  test('carry the mean of the other quantity over the hours within 0.5 K, and leave out what is missing', () => {
    const dryBulbC = new Float64Array(8760).fill(20);
    const wetBulbC2 = new Float64Array(8760).fill(10);
    // The 36 hottest hours: 35 at 40 °C and one at 39.6; within half a kelvin of it 39.1 counts, 39.09 does not.
    dryBulbC.fill(40, 0, 35).fill(39.6, 35, 36).fill(39.1, 36, 37).fill(39.09, 37, 38);
    wetBulbC2.fill(21, 0, 35).fill(24, 35, 36).fill(27, 36, 37).fill(30, 37, 38);
    wetBulbC2.fill(Number.NaN, 100, 200);
    const rows = designValues({ dryBulbC, wetBulbC: wetBulbC2, dewPointC: wetBulbC2 });
    // 8660 hours have both: place 34 is still one of the 40 °C.
    expect(rows.dryBulb[0]).toEqual({
      percent: 0.4,
      valueC: 40,
      coincidentC: Math.round((100 * (35 * 21 + 24)) / 36) / 100,
    });
    expect(rows.wetBulb.map(({ percent }) => percent)).toEqual([0.4, 1, 2, 5, 10]);
    const nothing = new Float64Array(8760).fill(Number.NaN);
    expect(designValues({ dryBulbC, wetBulbC: nothing, dewPointC: nothing }).dewPoint).toEqual([]);
  });
});

describe('high dew points', () => {
  const dewPoints = (columns: YearColumns) =>
    columns.dryBulbC.map((dryBulbC, slot) => {
      const [ratio = Number.NaN, pressurePa = Number.NaN] = [columns.humidityRatio[slot], columns.pressurePa[slot]];
      return Number.isNaN(dryBulbC + ratio + pressurePa) ? Number.NaN : dewPointC(dryBulbC, ratio, pressurePa);
    });
  const climates: readonly (readonly [string, (slot: number) => readonly [number, number, number]])[] = [
    ['dry and changeable', (slot) => [30 + 10 * Math.sin(slot / 40), 0.006 + 0.004 * Math.sin(slot / 97), 97_000]],
    ['humid and even, at changing pressure', (slot) => [30, 0.019 + 1e-4 * Math.sin(slot), 101_000 + (slot % 900)]],
    ['over saturation, so that the dry bulb is the dew point', (slot) => [5 + (slot % 25), 0.03, 90_000]],
    ['as cold and dry as the tables go', (slot) => [-60 - (slot % 31), 1e-7 * (1 + (slot % 9)), 60_000]],
    ['the same all year', () => [20, 0.008, 100_000]],
    ['lacking half of its hours', (slot) => [25, slot % 2 === 0 ? 0.005 + slot * 1e-6 : Number.NaN, 95_000]],
    ['never known', () => [25, Number.NaN, 95_000]],
  ];

  test.each(climates)('decide the same design values as all of them: a year that is %s', (_name, at) => {
    const columns = yearColumns(8760);
    for (let slot = 0; slot < 8760; slot++) {
      [columns.dryBulbC[slot], columns.humidityRatio[slot], columns.pressurePa[slot]] = at(slot);
    }
    const others = { dryBulbC: columns.dryBulbC, wetBulbC: columns.dryBulbC };
    const high = highDewPoints(columns);
    const all = dewPoints(columns);
    expect(designValues({ ...others, dewPointC: high })).toEqual(designValues({ ...others, dewPointC: all }));
    for (const [slot, value] of high.entries()) {
      if (value !== Number.NEGATIVE_INFINITY && !Object.is(value, all[slot])) expect.fail(`slot ${slot}: ${value}`);
    }
  });
});

describe('spells of low depression', () => {
  const low = (ranges: readonly (readonly [number, number])[]) => {
    const depression = new Int32Array(8760).fill(800);
    for (const [from, to] of ranges) depression.fill(499, from, to);
    return depression;
  };

  test('are the longest run under 5 K; 5.00 K ends one, and so does an unknown hour', () => {
    expect(
      longestLowDepression(
        low([
          [10, 20],
          [50, 65],
        ]),
        'typical',
      ),
    ).toEqual({
      hours: 15,
      startSlot: 50,
      endSlot: 64,
      cutAtJoint: false,
    });
    const broken = low([[50, 65]]);
    broken[55] = 500;
    broken[60] = -1;
    expect(longestLowDepression(broken, 'typical')?.hours).toBe(5);
    expect(longestLowDepression(new Int32Array(8760).fill(500), 'typical')).toBeNull();
  });

  test('are cut at the month joints of a typical year and run through those of an actual one', () => {
    const across = low([[740, 760]]);
    expect(longestLowDepression(across, 'typical')).toEqual({
      hours: 16,
      startSlot: 744,
      endSlot: 759,
      cutAtJoint: true,
    });
    expect(longestLowDepression(across, 'actual')).toEqual({
      hours: 20,
      startSlot: 740,
      endSlot: 759,
      cutAtJoint: false,
    });
  });
});

describe('a reduced year', () => {
  test('has the facts of the contract, adds up, and is the same bytes each time', () => {
    const once = reduceOrdinary();
    const { facts } = once;
    expect(() => YearFacts.parse(JSON.parse(JSON.stringify(facts)))).not.toThrow();
    expect(facts.measured).toBe(8760);
    expect(facts.depressionHours.every(({ hours }, index, all) => hours <= (all[index - 1]?.hours ?? 8760))).toBe(true);
    expect(facts.meanDepressionK).toHaveLength(12);
    expect(facts.monthCompletePct).toEqual(Array(12).fill(100));
    const mean = (facts.monthlyDepressionK[6] ?? 0) + (facts.monthlyWetBulbC[6] ?? 0);
    expect(mean).toBeCloseTo(facts.monthlyDryBulbC[6] ?? 0, 9);
    expect(facts.depressionCurveK).toHaveLength(101);
    expect(facts.depressionCurveK[0]).toBeCloseTo(facts.maxDepressionK ?? 0, 1);
    expect(once.year).toMatchObject({ kind: 'typical', year: null, utcOffsetMin: -420 });
    expect(JSON.stringify(reduce())).toBe(JSON.stringify(once));
  });

  test('that is saturated all year has no depression at all', () => {
    const { facts, depressionHours } = reduceUntested({
      hour: ({ slot }) => ({ dryBulbC: 10 + (slot % 24), dewPointC: 10 + (slot % 24), relativeHumidityPct: 100 }),
    });
    expect(facts.maxDepressionK).toBeLessThanOrEqual(0.01);
    expect(facts.depressionHours.every(({ hours }) => hours === 0)).toBe(true);
    expect(depressionHours.every((hours, place) => hours === 0 || place % DEPRESSION_BINS === 0)).toBe(true);
    expect(facts.meanWetBulbC).toBeCloseTo(facts.meanDryBulbC, 2);
  });

  test('of constant air has the depression of that air in every hour', () => {
    const { facts } = reduceUntested({
      hour: () => ({ dryBulbC: 35, dewPointC: 5, relativeHumidityPct: '', pressurePa: 999_999 }),
    });
    const pressurePa = standardPressurePa(337);
    const ratio = humidityRatioFromDewPoint({ dryBulbC: 35, dewPointC: 5, pressurePa, belowZero: 'water' });
    const expectedC = wetBulbC(35, Math.round(ratio / 2e-6) * 2e-6, Math.round(pressurePa / 2) * 2);
    expect(facts.meanWetBulbC).toBeCloseTo(expectedC, 9);
    expect(facts.assumedPressure).toBe(8760);
    expect(facts.measured).toBe(8760);
  });

  test('counts an hour as missing, repaired, estimated or measured, in this order', () => {
    const reading = readUsable({
      hour: ({ slot }) => ({
        flags: slot < 100 ? 'B8A7A7A7' : 'A7A7A7A7',
        // 10 hours of the interpolated ones are too many to fill, 2 are filled; 1 measured hour is filled.
        ...((slot >= 20 && slot < 30) || slot === 40 || slot === 42 || slot === 500 ? { dryBulbC: '99.9' } : {}),
        ...(slot === 600 ? { pressurePa: 999_999 } : {}),
      }),
    });
    const { facts } = reduceYear(reading);
    expect(facts).toMatchObject({ hours: 8760, missing: 10, repaired: 4, estimated: 88, measured: 8760 - 102 });
  });

  test('of which neither pressure nor elevation is known says so, and still counts', () => {
    const { facts, design } = reduce({
      location: 'Made-up Field,-,Nowhere,Invented,-,33.45,-111.98,-7.0,',
      hour: () => ({ pressurePa: 999_999 }),
    });
    expect(facts).toMatchObject({ missing: 8760, meanWetBulbC: null, maxDepressionK: null, depressionCurveK: [] });
    expect(facts.meanDryBulbC).toBeGreaterThan(20);
    expect(design.wetBulb).toEqual([]);
    expect(() => YearFacts.parse(JSON.parse(JSON.stringify(facts)))).not.toThrow();
  });
});

test('a year is usable for a brief when each month with schedule has 90 % of its hours and 35 % at most are repaired', () => {
  const monthCompletePct = [100, 90, 89.9, ...Array<number>(9).fill(100)];
  expect(usableFor({ monthCompletePct, repairedPct: 0 }, [1, 2])).toBe(true);
  expect(usableFor({ monthCompletePct, repairedPct: 0 }, [2, 3])).toBe(false);
  expect(usableFor({ monthCompletePct, repairedPct: 35 }, [1])).toBe(true);
  expect(usableFor({ monthCompletePct, repairedPct: 35.1 }, [1])).toBe(false);
});

test('an assumed pressure counts beside the four kinds of hours, in known hours only', () => {
  const flags = hourFlags({ dryBulb: 'measured', humidity: 'estimated', pressure: 'estimated' });
  const packed = packYear({
    dryBulbC: new Float64Array(8760).fill(20).fill(Number.NaN, 0, 10),
    humidityRatio: new Float64Array(8760).fill(0.01),
    pressurePa: new Float64Array(8760).fill(101_325),
    flags: new Uint8Array(8760).fill(flags),
  });
  expect(countHours(packed)).toEqual({
    hours: 8760,
    measured: 0,
    estimated: 8750,
    repaired: 0,
    missing: 10,
    assumedPressure: 8750,
  });
});

test('the cumulative curve begins at the greatest depression and ends at the least', () => {
  const depression = Int32Array.from({ length: 8760 }, (_none, slot) => (slot < 100 ? -1 : slot));
  const curve = depressionCurve(depression);
  expect([curve[0], curve[50], curve[100]]).toEqual([87.59, 44.3, 1]);
});
