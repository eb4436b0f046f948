import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { simplePayback } from '#engine/money/simple-payback.ts';
import { casesOf } from '../support/published-values.ts';

const ZERO_CELSIUS_K = 273.15;

/** The product takes one COP for the year; this form stands here alone, for comparison. */
function carnotCop(input: { grade: number; evaporatingC: number; approachK: number; outdoorC: number; most: number }) {
  const liftK = input.outdoorC + input.approachK - input.evaporatingC;
  const cop = (input.grade * (input.evaporatingC + ZERO_CELSIUS_K)) / liftK;
  return liftK > 0 ? Math.min(cop, input.most) : input.most;
}

describe('money and the reference plant', () => {
  test('N01 the COP by the Carnot form falls with the outdoor temperature and is capped', () => {
    const cases = casesOf('N01', {
      grade: z.number(),
      evaporatingC: z.number(),
      approachK: z.number(),
      outdoorC: z.number(),
      most: z.number(),
      expected: z.number(),
      tolerance: z.number(),
    });
    for (const { expected, tolerance, ...given } of cases) {
      expect(Math.abs(carnotCop(given) - expected), `${given.outdoorC} °C`).toBeLessThanOrEqual(tolerance);
    }
    const byOutdoor = cases.toSorted((one, other) => one.outdoorC - other.outdoorC).map((each) => carnotCop(each));
    expect(byOutdoor).toEqual(byOutdoor.toSorted((one, other) => other - one));
    expect(new Set(byOutdoor).size).toBe(6);
  });

  test('N02 simple payback is capital over saving, never without a saving, at once without extra capital', () => {
    const expected = z.union([z.number(), z.enum(['never', 'at once'])]);
    const cases = casesOf('N02', { extraCapital: z.number(), savingPerYear: z.number(), expected });
    for (const { expected: payback, ...given } of cases) expect(simplePayback(given)).toBe(payback);
    expect(cases).toHaveLength(5);
  });
});
