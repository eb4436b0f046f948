import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { adjustToHeight } from '#engine/climate/adjust-to-height.ts';
import { shiftedAndStretchedC, stretchOf } from '#engine/climate/monthly-change.ts';
import { dewPointC, humidityRatioFromDewPoint, relativeHumidityPct } from '#engine/psychrometrics/moist-air.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import { casesOf } from '../support/published-values.ts';
import { syntheticYear } from '../support/synthetic-year.ts';

describe('other climates and heights against computed values', () => {
  test('F01 a month is shifted and stretched about its mean', () => {
    const cases = casesOf('F01', {
      meanC: z.number(),
      meanMaxC: z.number(),
      meanMinC: z.number(),
      shiftK: z.number(),
      maxShiftK: z.number(),
      minShiftK: z.number(),
      stretch: z.number(),
      hourC: z.number(),
      derivedC: z.number(),
      meanRiseK: z.number(),
      tolerance: z.number(),
    });
    for (const { stretch, hourC, derivedC, meanRiseK, tolerance, ...month } of cases) {
      const found = stretchOf(month, month);
      expect(Math.abs(found - stretch)).toBeLessThanOrEqual(tolerance);
      const derive = (tempC: number) => shiftedAndStretchedC(tempC, { ...month, stretch: found });
      expect(Math.abs(derive(hourC) - derivedC)).toBeLessThanOrEqual(tolerance);
      // Over any hours whose mean is the month's, the mean rises by the shift.
      const hours = [-9, -4, -1, 2, 5, 7].map((away) => month.meanC + away);
      const rise = hours.reduce((sum, hour) => sum + derive(hour) - hour, 0) / hours.length;
      expect(Math.abs(rise - meanRiseK)).toBeLessThanOrEqual(tolerance);
    }
    expect(cases).toHaveLength(1);
  });

  test('F02 a state keeps its humidity ratio at another height', () => {
    const state = {
      dryBulbC: z.number(),
      dewPointC: z.number(),
      pressurePa: z.number(),
      wetBulbC: z.number(),
      relativeHumidityPct: z.number(),
    };
    const cases = casesOf('F02', {
      ...state,
      fromElevationM: z.number(),
      toElevationM: z.number(),
      humidityRatio: z.number(),
      expected: z.object(state),
      toleranceC: z.number(),
      tolerancePa: z.number(),
      tolerancePct: z.number(),
    });
    for (const { expected, fromElevationM, toElevationM, humidityRatio, ...given } of cases) {
      const { toleranceC, tolerancePa, tolerancePct, ...before } = given;
      const computed = humidityRatioFromDewPoint({ ...before, belowZero: 'water' });
      expect(Math.abs(computed / humidityRatio - 1)).toBeLessThan(1e-5);
      const tolerances = { dryBulbC: toleranceC, dewPointC: toleranceC, wetBulbC: toleranceC };
      const all = { ...tolerances, pressurePa: tolerancePa, relativeHumidityPct: tolerancePct };
      const year = syntheticYear({ at: () => ({ ...before, humidityRatio }) });
      const moved = adjustToHeight({ year, fromElevationM, toElevationM });
      for (const [weather, wanted] of [
        [year, before],
        [moved, expected],
      ] as const) {
        const { dryBulbC, humidityRatio: ratios, pressurePa } = unpackYear(weather.packed);
        const [t = Number.NaN, w = Number.NaN, p = Number.NaN] = [dryBulbC[4000], ratios[4000], pressurePa[4000]];
        const found = {
          dryBulbC: t,
          pressurePa: p,
          dewPointC: dewPointC(t, w, p),
          wetBulbC: wetBulbC(t, w, p),
          relativeHumidityPct: relativeHumidityPct(t, w, p),
        };
        for (const name of ['dryBulbC', 'dewPointC', 'pressurePa', 'wetBulbC', 'relativeHumidityPct'] as const) {
          expect(Math.abs(found[name] - wanted[name]), `${name} ${found[name]}`).toBeLessThanOrEqual(all[name]);
        }
      }
      expect(moved.packed.humidityRatio).toEqual(year.packed.humidityRatio);
    }
    expect(cases).toHaveLength(1);
  });
});
