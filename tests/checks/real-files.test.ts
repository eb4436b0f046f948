import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { type ReducedYear, reduceYear } from '#engine/reduction/reduce-year.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { casesOf } from '../support/published-values.ts';
import { realFile, sharedFolder, WITHOUT_SHARED } from '../support/shared.ts';

const title = 'real weather files against published values';

function reduced(file: string): ReducedYear {
  const reading = readWeatherFile(realFile(file), file);
  if (reading.status === 'refused' || reading.hours === null) throw new Error(`${file} cannot be used`);
  return reduceYear(reading);
}

/** Numbers, sources and tags stand in data/checks/real-files/design-values.json. */
describe.skipIf(sharedFolder === null)(sharedFolder === null ? `${title} (skipped: ${WITHOUT_SHARED})` : title, () => {
  test('D03 a typical year of Miami has its design values near those that are published for the station', () => {
    const cases = casesOf('D03', {
      file: z.string(),
      quantity: z.enum(['dryBulb', 'wetBulb']),
      percent: z.array(z.number()),
      expectedC: z.array(z.number()),
      tolerance: z.number(),
    });
    let compared = 0;
    for (const { expectedC, file, percent, quantity, tolerance } of cases) {
      const rows = reduced(file).design[quantity];
      for (const [index, each] of percent.entries()) {
        const found = rows.find((row) => row.percent === each)?.valueC ?? Number.NaN;
        const difference = Math.abs(found - (expectedC[index] ?? Number.NaN));
        expect(difference, `${quantity} at ${each} %`).toBeLessThanOrEqual(tolerance);
        compared++;
      }
    }
    expect(compared).toBe(6);
  });

  test('D04 hours with a depression of at least 5 K in Miami and Sand Point are those of independent reductions', () => {
    const cases = casesOf('D04', {
      file: z.string(),
      depressionK: z.number(),
      expected: z.number(),
      tolerance: z.number(),
    });
    expect(cases).toHaveLength(2);
    for (const { depressionK, expected, file, tolerance } of cases) {
      const { depressionHours } = reduced(file).facts;
      const hours = depressionHours.find(({ atLeastK }) => atLeastK === depressionK)?.hours ?? Number.NaN;
      expect(Math.abs(hours - expected), file).toBeLessThanOrEqual(tolerance);
    }
  });
});
