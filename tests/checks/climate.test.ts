import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { adjustToHeight } from '#engine/climate/adjust-to-height.ts';
import { heldCheck } from '../support/held-check.ts';
import { casesOf } from '../support/published-values.ts';
import { syntheticYear } from '../support/synthetic-year.ts';

describe('other climates and heights against computed values', () => {
  test('F01 a month is shifted and stretched about its mean', () => {
    expect(heldCheck('F01')).toHaveLength(3);
  });

  test('F02 a state keeps its humidity ratio at another height', () => {
    expect(heldCheck('F02')).toHaveLength(11);
    const [moved] = casesOf('F02', {
      dryBulbC: z.number(),
      pressurePa: z.number(),
      humidityRatio: z.number(),
      fromElevationM: z.number(),
      toElevationM: z.number(),
    });
    if (moved === undefined) throw new Error('F02 has no case');
    const { fromElevationM, toElevationM, ...state } = moved;
    const year = syntheticYear({ at: () => state });
    const { packed } = adjustToHeight({ year, fromElevationM, toElevationM });
    expect(packed.humidityRatio).toEqual(year.packed.humidityRatio);
  });
});
