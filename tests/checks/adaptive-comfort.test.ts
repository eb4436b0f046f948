import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import * as z from 'zod/mini';
import { adaptiveLimit } from '#engine/hour-classes/adaptive-limit.ts';

const Model = z.enum(['ashrae55-80', 'ashrae55-90', 'en16798-i', 'en16798-ii', 'en16798-iii']);

/** Values of data/checks/adaptive-comfort.json; source and tag stand there beside each number. */
const { checks } = z
  .object({
    checks: z.array(
      z.object({
        id: z.enum(['C01', 'C02']),
        cases: z.array(
          z.object({
            runningMeanC: z.number(),
            comfortC: z.nullable(z.number()),
            upperC: z.partialRecord(Model, z.number()),
            outsideRange: z.boolean(),
            tolerance: z.number(),
          }),
        ),
      }),
    ),
  })
  .parse(JSON.parse(readFileSync(new URL('../../data/checks/adaptive-comfort.json', import.meta.url), 'utf8')));

const anyModelOf = { C01: 'ashrae55-80', C02: 'en16798-i' } as const;

test.each(checks)(
  '$id $cases.length adaptive limits are as published, and a running mean outside the range is said so',
  ({ id, cases }) => {
    let limits = 0;
    for (const { runningMeanC, comfortC, upperC, outsideRange, tolerance } of cases) {
      const found = adaptiveLimit(anyModelOf[id], runningMeanC);
      expect(found.outsideRange).toBe(outsideRange);
      if (comfortC !== null) expect(Math.abs(found.comfortC - comfortC)).toBeLessThanOrEqual(tolerance);
      for (const [name, expectedC] of Object.entries(upperC)) {
        const { upperC: foundC } = adaptiveLimit(Model.parse(name), runningMeanC);
        expect(Math.abs(foundC - expectedC), `${name} at ${runningMeanC} °C: ${foundC}`).toBeLessThanOrEqual(tolerance);
        limits += 1;
      }
    }
    expect(limits).toBe(id === 'C01' ? 3 : 4);
  },
);

test('a running mean outside the range takes the limit of the nearest end', () => {
  expect(adaptiveLimit('ashrae55-80', 40).upperC).toBe(adaptiveLimit('ashrae55-80', 33.5).upperC);
  expect(adaptiveLimit('en16798-ii', 31).upperC).toBe(adaptiveLimit('en16798-ii', 30).upperC);
  expect(adaptiveLimit('en16798-ii', 3).upperC).toBe(adaptiveLimit('en16798-ii', 10).upperC);
});
