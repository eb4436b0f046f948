import { describe, expect, test } from 'vitest';
import type { Brief } from '#engine/brief/brief.ts';
import { runningMeansC } from '#engine/hour-classes/running-mean.ts';
import { setPoints } from '#engine/hour-classes/set-points.ts';

/** A year of days of one temperature each, °C. */
function yearOf(dayC: (day: number) => number): Float64Array {
  return Float64Array.from({ length: 8760 }, (_, slot) => dayC(Math.floor(slot / 24)));
}

describe('the running mean of the outdoor temperature', () => {
  test('of a steady year is that temperature on every day', () => {
    const means = runningMeansC(
      yearOf(() => 21.5),
      true,
    );
    expect(means).toHaveLength(365);
    expect(Math.max(...means.map((mean) => Math.abs(mean - 21.5)))).toBeLessThan(1e-9);
  });

  test('gives yesterday 0.2, the day before 0.16, and so on over 30 days, by the sum of the weights', () => {
    const means = runningMeansC(
      yearOf((day) => (day === 100 ? 1 : 0)),
      false,
    );
    const weights = 1 - 0.8 ** 30;
    expect(means[100]).toBe(0);
    expect(means[101]).toBeCloseTo(0.2 / weights, 12);
    expect(means[102]).toBeCloseTo(0.16 / weights, 12);
    expect(means[130]).toBeCloseTo((0.2 * 0.8 ** 29) / weights, 12);
    expect(means[131]).toBe(0);
  });

  test('wraps into December in a typical year and starts with what there is in an actual one', () => {
    const warmDecember = yearOf((day) => (day === 364 ? 10 : 0));
    expect(runningMeansC(warmDecember, true)[0]).toBeCloseTo(2 / (1 - 0.8 ** 30), 12);
    expect(runningMeansC(warmDecember, false)[1]).toBe(0);
    const rising = yearOf((day) => day + 5);
    expect(runningMeansC(rising, false)[0]).toBe(5);
    expect(runningMeansC(rising, false)[1]).toBe(5);
  });

  test('leaves out days without a known hour, with their weight', () => {
    const gap = yearOf((day) => (day === 49 ? Number.NaN : 12));
    expect(runningMeansC(gap, false)[50]).toBeCloseTo(12, 12);
  });
});

describe('set-points', () => {
  const limit = { kind: 'adaptive', model: 'ashrae55-80', ceilingC: 32 } as const;
  const derate = '1 K per 300 m above 900 m';

  function setPointsOf(brief: Pick<Brief, 'limit'> & Partial<Pick<Brief, 'hardLimits'>>, dayC = 40, heightM = 0) {
    return setPoints({ brief: { hardLimits: [], ...brief }, dryBulbC: yearOf(() => dayC), wrapped: true, heightM });
  }

  test('of an adaptive limit follow the running mean, clamped to its range and to the ceiling', () => {
    const warm = setPointsOf({ limit }, 20);
    expect(warm.setC[0]).toBeCloseTo(27.5, 9);
    expect(warm.outsideRange?.[0]).toBe(0);
    const hot = setPointsOf({ limit });
    expect(hot.setC[5000]).toBeCloseTo(0.31 * 33.5 + 21.3, 9);
    expect(hot.outsideRange?.[5000]).toBe(1);
    const low = setPointsOf({ limit: { ...limit, ceilingC: 28 } }, 30);
    expect(low.setC[5000]).toBe(28);
  });

  test('of a fixed limit are that temperature, and an index limit has none', () => {
    const fixed = setPointsOf({ limit: { kind: 'fixed', tempC: 26 } });
    expect([fixed.setC[0], fixed.outsideRange]).toEqual([26, null]);
    expect(setPointsOf({ limit: { kind: 'thi', value: 72 } }).setC[0]).toBeNaN();
  });

  test('of a hall are the lower of its limit and its hard limit, each derated where it says so', () => {
    const hall = {
      limit: { kind: 'inlet', tempC: 27 },
      hardLimits: [{ tempC: 32, hours: 0, derate }],
    } as const;
    expect(setPointsOf(hall, 20, 900).setC[0]).toBe(27);
    expect(setPointsOf(hall, 20, 2355).setC[0]).toBe(27);
    expect(setPointsOf(hall, 20, 3026).setC[8759]).toBeCloseTo(32 - 2126 / 300, 9);
    const allowable = { limit: { kind: 'inlet', tempC: 32, derate } } as const;
    expect(setPointsOf(allowable, 20, 1200).setC[0]).toBe(31);
  });
});
