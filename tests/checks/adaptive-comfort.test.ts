import { expect, test } from 'vitest';
import * as z from 'zod/mini';
import { adaptiveLimit } from '#engine/hour-classes/adaptive-limit.ts';
import { casesOf } from '../support/published-values.ts';

const Model = z.enum(['ashrae55-80', 'ashrae55-90', 'en16798-i', 'en16798-ii', 'en16798-iii']);

/** Holds every case of a check, and answers how many limits it looked at. */
function limitsAsPublished(id: 'C01' | 'C02', anyModel: z.infer<typeof Model>): number {
  let limits = 0;
  const cases = casesOf(id, {
    runningMeanC: z.number(),
    comfortC: z.nullable(z.number()),
    upperC: z.partialRecord(Model, z.number()),
    outsideRange: z.boolean(),
    tolerance: z.number(),
  });
  for (const { runningMeanC, comfortC, upperC, outsideRange, tolerance } of cases) {
    const found = adaptiveLimit(anyModel, runningMeanC);
    expect(found.outsideRange).toBe(outsideRange);
    if (comfortC !== null) expect(Math.abs(found.comfortC - comfortC)).toBeLessThanOrEqual(tolerance);
    for (const [name, expectedC] of Object.entries(upperC)) {
      const { upperC: foundC } = adaptiveLimit(Model.parse(name), runningMeanC);
      expect(Math.abs(foundC - expectedC), `${name} at ${runningMeanC} °C: ${foundC}`).toBeLessThanOrEqual(tolerance);
      limits += 1;
    }
  }
  return limits;
}

test('C01 ASHRAE 55 limits are as published, and a running mean outside the range is said so', () => {
  expect(limitsAsPublished('C01', 'ashrae55-80')).toBe(3);
});

test('C02 EN 16798-1 limits are as published, and a running mean outside the range is said so', () => {
  expect(limitsAsPublished('C02', 'en16798-i')).toBe(4);
});

test('a running mean outside the range takes the limit of the nearest end', () => {
  expect(adaptiveLimit('ashrae55-80', 40).upperC).toBe(adaptiveLimit('ashrae55-80', 33.5).upperC);
  expect(adaptiveLimit('en16798-ii', 31).upperC).toBe(adaptiveLimit('en16798-ii', 30).upperC);
  expect(adaptiveLimit('en16798-ii', 3).upperC).toBe(adaptiveLimit('en16798-ii', 10).upperC);
});
