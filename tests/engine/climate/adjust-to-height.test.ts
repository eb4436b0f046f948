import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { adjustToHeight, heightInSteps } from '#engine/climate/adjust-to-height.ts';
import { saturationHumidityRatio } from '#engine/psychrometrics/moist-air.ts';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import { sameValues } from '../../support/same-values.ts';
import { propertySettings } from '../../support/sample-size.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const year = syntheticYear({
  kind: 'actual',
  year: 2023,
  at: (slot) =>
    slot % 97 === 5
      ? null
      : {
          dryBulbC: 12 + 18 * Math.sin(slot / 900) + 7 * Math.sin((2 * Math.PI * slot) / 24),
          saturation: 0.55 + 0.45 * Math.sin(slot / 31),
          pressurePa: 95_000 + 900 * Math.sin(slot / 200),
        },
});

describe('weather moved to another height', () => {
  test('is colder and thinner higher up, as damp as before unless that passes saturation, and missing where it was', () => {
    const heights = fc.integer({ min: -400, max: 4500 });
    fc.assert(
      fc.property(heights, heights, (fromElevationM, toElevationM) => {
        const moved = adjustToHeight({ year, fromElevationM, toElevationM });
        expect(moved).toMatchObject({ kind: 'actual', year: 2023, utcOffsetMin: 0 });
        expect(sameValues(moved.packed.flags, year.packed.flags)).toBe(true);
        const before = unpackYear(year.packed);
        const after = unpackYear(moved.packed);
        for (let slot = 0; slot < 8760; slot += 3) {
          const [t = 0, w = 0, p = 0] = [after.dryBulbC[slot], after.humidityRatio[slot], after.pressurePa[slot]];
          if (slot % 97 === 5) {
            if (!Number.isNaN(t) || !Number.isNaN(w) || !Number.isNaN(p)) expect.fail(`slot ${slot} was missing`);
            continue;
          }
          const fallK = (before.dryBulbC[slot] ?? Number.NaN) - t;
          // Half a step of each packed column: 0.005 K, 1 Pa, 1e-6 kg/kg.
          if (Math.abs(fallK - 0.0065 * (toElevationM - fromElevationM)) > 0.0051)
            expect.fail(`slot ${slot}: ${fallK} K`);
          const kept = before.humidityRatio[slot] ?? Number.NaN;
          const saturated = saturationHumidityRatio(t, p);
          // 0.005 K and 1 Pa move saturation by at most 0.06 %.
          const wanted = fromElevationM === toElevationM ? kept : Math.min(kept, saturated);
          if (Math.abs(w - wanted) > 1.1e-6 + 6e-4 * saturated) expect.fail(`slot ${slot}: ${w} kg/kg, not ${wanted}`);
        }
      }),
      propertySettings(25),
    );
  });

  test('comes back within the steps of its columns, where nothing was saturated on the way', () => {
    const dry = syntheticYear({ at: (slot) => ({ dryBulbC: 25 + (slot % 13), saturation: 0.1, pressurePa: 98_000 }) });
    const up = adjustToHeight({ year: dry, fromElevationM: 100, toElevationM: 1200 });
    const back = adjustToHeight({ year: up, fromElevationM: 1200, toElevationM: 100 });
    expect(sameValues(back.packed.dryBulb, dry.packed.dryBulb)).toBe(true);
    expect(sameValues(back.packed.humidityRatio, dry.packed.humidityRatio)).toBe(true);
    // One step of 2 Pa.
    const apart = back.packed.pressure.map((value, slot) => Math.abs(value - (dry.packed.pressure[slot] ?? 0)));
    expect(Math.max(...apart)).toBeLessThanOrEqual(1);
  });

  test('is the same year at the same height, and refused without a height', () => {
    expect(adjustToHeight({ year, fromElevationM: 310, toElevationM: 310 })).toBe(year);
    expect(() => adjustToHeight({ year, fromElevationM: Number.NaN, toElevationM: 0 })).toThrow('not known');
    expect([304.9, 305, -3, 0].map(heightInSteps)).toEqual([300, 310, 0, 0]);
  });
});
