import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { greatCircleKm } from '#engine/interpolation/great-circle-km.ts';
import { casesOf } from '../support/published-values.ts';

describe('distance against computed values', () => {
  test('I02 one degree of latitude, and Phoenix to Las Vegas', () => {
    const place = z.object({ latitude: z.number(), longitude: z.number() });
    const cases = casesOf('I02', { from: place, to: place, km: z.number(), tolerance: z.number() });
    for (const { from, to, km, tolerance } of cases) {
      expect(Math.abs(greatCircleKm(from, to) - km)).toBeLessThanOrEqual(tolerance);
      expect(Math.abs(greatCircleKm(to, from) - km)).toBeLessThanOrEqual(tolerance);
    }
    expect(cases).toHaveLength(2);
  });
});
