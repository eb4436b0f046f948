import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { capsHold } from '#engine/hour-classes/caps.ts';
import { temperatureHumidityIndex } from '#engine/hour-classes/index-limit.ts';
import {
  dewPointC,
  humidityRatioFromDewPoint,
  humidityRatioFromRelativeHumidity,
} from '#engine/psychrometrics/moist-air.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { casesOf } from '../support/published-values.ts';

const air = { dryBulbC: z.number(), relativeHumidityPct: z.number() };

describe('limits of halls and animal houses against published values', () => {
  test('C03 every cap of a hall applies at once', () => {
    const cases = casesOf('C03', {
      ...air,
      pressurePa: z.number(),
      supplyRhPct: z.number(),
      supplyDewPointC: z.number(),
      passes: z.boolean(),
      dewPointC: z.nullable(z.number()),
    });
    for (const { dryBulbC, relativeHumidityPct, pressurePa, passes, dewPointC: expectedC, ...caps } of cases) {
      const humidityRatio = humidityRatioFromRelativeHumidity({
        dryBulbC,
        relativeHumidityPct,
        pressurePa,
        belowZero: 'water',
      });
      const supply = { tempC: dryBulbC, humidityRatio, pressurePa, supplyAimC: dryBulbC, roomRiseK: 0 };
      expect(capsHold(supply, { caps, dwRoomKgKg: 0 }), `${dryBulbC} °C ${relativeHumidityPct} %`).toBe(passes);
      if (expectedC !== null) expect(dewPointC(dryBulbC, humidityRatio, pressurePa)).toBeCloseTo(expectedC, 1);
    }
    expect(cases).toHaveLength(3);
  });

  test('C04 the temperature-humidity index has the form of NRC 1971', () => {
    const cases = casesOf('C04', { ...air, expected: z.number(), tolerance: z.number() });
    for (const { dryBulbC, relativeHumidityPct, expected, tolerance } of cases) {
      const found = temperatureHumidityIndex(dryBulbC, relativeHumidityPct);
      expect(Math.abs(found - expected), `${dryBulbC} °C ${relativeHumidityPct} %: ${found}`).toBeLessThanOrEqual(
        tolerance,
      );
    }
    expect(cases).toHaveLength(4);
  });

  test('C05 the index of broilers counts the speed of the air; no brief limits it', () => {
    const cases = casesOf('C05', {
      dryBulbC: z.number(),
      dewPointC: z.number(),
      pressurePa: z.number(),
      airSpeedMPerS: z.number(),
      expected: z.number(),
      tolerance: z.number(),
    });
    for (const { expected, tolerance, airSpeedMPerS, ...given } of cases) {
      const humidityRatio = humidityRatioFromDewPoint({ ...given, belowZero: 'water' });
      const wetBulb = wetBulbC(given.dryBulbC, humidityRatio, given.pressurePa);
      const found = (0.85 * given.dryBulbC + 0.15 * wetBulb) * airSpeedMPerS ** -0.058;
      expect(Math.abs(found - expected), `${airSpeedMPerS} m/s: ${found}`).toBeLessThanOrEqual(tolerance);
    }
    expect(cases).toHaveLength(2);
  });
});
