import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { designValues, valueAtPercent } from '#engine/reduction/design-values.ts';
import { reduceYear } from '#engine/reduction/reduce-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { readWeatherFile } from '#engine/weather-files/read-weather-file.ts';
import { epwBytes } from '../support/epw-text.ts';
import { heldCheck } from '../support/held-check.ts';
import { presetBrief } from '../support/presets.ts';
import { casesOf } from '../support/published-values.ts';

/** Numbers, sources and tags stand in data/checks/design-values.json. */
describe('design values and counting against published values', () => {
  test('D01 n-year extremes from mean and deviation are the published ones to 0.2 K', () => {
    expect(heldCheck('D01')).toHaveLength(16);
  });

  test('D02 of the values 1 to 8760 at most 0.4, 1 and 2 % of the hours lie above the design value', () => {
    expect(heldCheck('D02')).toHaveLength(3);
    // The same rule in the design values of a year: 0.00 to 87.59 °C in steps of 0.01 K, in any order.
    const downwards = Int32Array.from({ length: 8760 }, (_none, index) => 8760 - index);
    const values = casesOf('D02', { percent: z.number() }).map(({ percent }) => valueAtPercent(downwards, percent));
    const column = Float64Array.from({ length: 8760 }, (_none, slot) => ((slot * 7919) % 8760) / 100);
    const rows = designValues({ dryBulbC: column, wetBulbC: column, dewPointC: column }).dryBulb;
    expect(rows.slice(0, 3).map(({ valueC }) => Math.round(100 * valueC) + 1)).toEqual(values);
  });

  test('D05 hours by provenance, by depression and by hour class each add up to the hours of the year', () => {
    expect(heldCheck('D05')).toHaveLength(2);
    const cases = casesOf('D05', { slots: z.number(), expected: z.number() });
    expect(cases).toHaveLength(2);
    for (const { expected, slots } of cases) {
      // 50 hours in a row have no dry bulb and stay missing; 3 more are filled.
      const hour = ({ slot }: { slot: number }) =>
        (slot >= 4000 && slot < 4050) || (slot >= 6000 && slot < 6003) ? { dryBulbC: '99.9' } : {};
      const reading = readWeatherFile(epwBytes({ slots, hour }), 'made-up.epw');
      if (reading.status === 'refused' || reading.hours === null) throw new Error('refused');
      const { depressionHours, facts, histogram, year } = reduceYear(reading);
      expect(facts.measured + facts.estimated + facts.repaired + facts.missing).toBe(expected);
      expect(facts.missing).toBe(50);
      expect(facts.repaired).toBe(3);
      const binned = depressionHours.reduce((sum, hours) => sum + hours, 0);
      expect(binned + facts.missing).toBe(expected);
      expect(histogram.reduce((sum, hours) => sum + hours, 0)).toBe(binned);
      const { classes } = judgeYear({
        year,
        brief: presetBrief('office'),
        zone: 'America/Phoenix',
        heightM: 337,
      }).ledger;
      expect(Object.values(classes).reduce((sum, hours) => sum + hours, 0)).toBe(expected);
    }
  });
});
