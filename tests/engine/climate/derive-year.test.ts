import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { deriveYear } from '#engine/climate/derive-year.ts';
import { monthClimates } from '#engine/climate/month-climates.ts';
import { humidityRules, type MonthlyChange } from '#engine/climate/monthly-change.ts';
import { relativeHumidityPct, saturationHumidityRatio } from '#engine/psychrometrics/moist-air.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { monthOfEachSlot } from '#engine/reduction/calendar.ts';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import { sameColumns, sameValues } from '../../support/same-values.ts';
import { propertySettings } from '../../support/sample-size.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const isMissing = (slot: number): boolean => slot % 89 === 7 || (slot >= 5000 && slot < 5040);

/** From deep frost to heat, from bone dry to saturated, with hours missing. */
function parentYear(slots = 8760): WeatherYear {
  const year = syntheticYear({
    slots,
    at: (slot) =>
      isMissing(slot)
        ? null
        : {
            dryBulbC: 11 - 16 * Math.cos((2 * Math.PI * slot) / slots) + 6 * Math.sin((2 * Math.PI * (slot - 9)) / 24),
            saturation: 0.52 + 0.48 * Math.sin(slot / 17),
            pressurePa: 97_000 + 800 * Math.sin(slot / 77),
          },
    utcOffsetMin: 60,
  });
  for (let slot = 0; slot < slots; slot++) year.packed.flags[slot] = isMissing(slot) ? 63 : slot % 3;
  return year;
}

const parent = parentYear();
const months = monthOfEachSlot(8760);
const twelve = (change: Partial<MonthlyChange>): MonthlyChange[] =>
  Array.from({ length: 12 }, () => ({ shiftK: 0, maxShiftK: 0, minShiftK: 0, ratioChangePct: 0, ...change }));
const warmer = (k: number): MonthlyChange[] => twelve({ shiftK: k, maxShiftK: k, minShiftK: k });

const tenths = (min: number, max: number) => fc.integer({ min: 10 * min, max: 10 * max }).map((n) => n / 10);
const anyChange = fc.record({ shiftK: tenths(-5, 8), swing: tenths(-3, 3), ratioChangePct: tenths(-20, 40) }).map(
  ({ shiftK, swing, ratioChangePct }): MonthlyChange => ({
    shiftK,
    maxShiftK: shiftK + swing / 2,
    minShiftK: shiftK - swing / 2,
    ratioChangePct,
  }),
);
const anyChanges = fc.array(anyChange, { minLength: 12, maxLength: 12 });
const anyRule = fc.constantFrom(...humidityRules);

/** Leaves an hour with a saturation that lies less than a millionth of a packed step under a whole one. */
const nearWholeStep = twelve({}).map((change, month) =>
  month === 2 ? { ...change, shiftK: -5, maxShiftK: -5.9, minShiftK: -4.1 } : change,
);

describe('a derived year', () => {
  test('has monthly means that rise by exactly the shift, and days stretched by what was asked', () => {
    fc.assert(
      fc.property(anyChanges, anyRule, (monthly, humidityRule) => {
        const { year: derived } = deriveYear({ parent, monthly, humidityRule });
        const before = monthClimates(unpackYear(parent.packed).dryBulbC);
        const after = monthClimates(unpackYear(derived.packed).dryBulbC);
        for (const [month, change] of monthly.entries()) {
          const [from, to] = [before[month], after[month]];
          if (from == null || to == null) throw new Error('every month has hours');
          // Packed in steps of 0.01 K, each hour is off by at most half a step, and so is a mean of them.
          expect(Math.abs(to.meanC - from.meanC - change.shiftK)).toBeLessThanOrEqual(0.005);
          const widened = to.meanMaxC - to.meanMinC - (from.meanMaxC - from.meanMinC);
          expect(Math.abs(widened - (change.maxShiftK - change.minShiftK))).toBeLessThanOrEqual(0.011);
        }
      }),
      propertySettings(25),
    );
  });

  test('is the parent, column by column, when nothing changes', () => {
    for (const each of [parent, parentYear(8784)]) {
      for (const humidityRule of humidityRules) {
        const { year: derived } = deriveYear({ parent: each, monthly: twelve({}), humidityRule });
        expect(sameColumns({ ...derived.packed }, { ...each.packed })).toBe(true);
        expect(derived).toMatchObject({ kind: 'derived', year: null, utcOffsetMin: 60 });
      }
    }
  });

  test('is never damper than saturated, missing where the parent is, with its flags and its pressure', () => {
    let changedHours = 0;
    fc.assert(
      fc.property(anyChanges, anyRule, (monthly, humidityRule) => {
        const { year: derived } = deriveYear({ parent, monthly, humidityRule });
        expect(sameValues(derived.packed.flags, parent.packed.flags)).toBe(true);
        expect(sameValues(derived.packed.pressure, parent.packed.pressure)).toBe(true);
        const { dryBulbC, humidityRatio, pressurePa } = unpackYear(derived.packed);
        for (let slot = 0; slot < 8760; slot++) {
          const [t = 0, w = 0, p = 0] = [dryBulbC[slot], humidityRatio[slot], pressurePa[slot]];
          if (isMissing(slot) !== Number.isNaN(t) || isMissing(slot) !== Number.isNaN(w)) expect.fail(`slot ${slot}`);
          const same =
            derived.packed.dryBulb[slot] === parent.packed.dryBulb[slot] &&
            derived.packed.humidityRatio[slot] === parent.packed.humidityRatio[slot];
          if (isMissing(slot) || same) continue;
          changedHours += 1;
          if (w > saturationHumidityRatio(t, p) + 1e-12) expect.fail(`slot ${slot}: ${w} kg/kg at ${t} °C`);
        }
      }),
      { ...propertySettings(25), examples: [[nearWholeStep, 'ratio-kept']] },
    );
    expect(changedHours).toBeGreaterThan(25 * 8000);
  });

  test('with w kept and warmer hours keeps every w, and its wet bulb rises less than its dry bulb', () => {
    const { year: derived } = deriveYear({ parent, monthly: warmer(2.5), humidityRule: 'ratio-kept' });
    expect(sameValues(derived.packed.humidityRatio, parent.packed.humidityRatio)).toBe(true);
    const before = unpackYear(parent.packed);
    const after = unpackYear(derived.packed);
    let compared = 0;
    for (let slot = 0; slot < 8760; slot += 5) {
      const [t = 0, w = 0, p = 0] = [before.dryBulbC[slot], before.humidityRatio[slot], before.pressurePa[slot]];
      if (isMissing(slot)) continue;
      compared += 1;
      const rise = wetBulbC(after.dryBulbC[slot] ?? Number.NaN, w, p) - wetBulbC(t, w, p);
      if (!(rise > 0 && rise < 2.5)) expect.fail(`slot ${slot}: the wet bulb rises ${rise} K`);
    }
    expect(compared).toBeGreaterThan(1700);
  });

  test('with relative humidity kept has that of the parent, within the steps of the columns', () => {
    const { year: derived } = deriveYear({ parent, monthly: warmer(3), humidityRule: 'rh-kept' });
    const before = unpackYear(parent.packed);
    const after = unpackYear(derived.packed);
    let compared = 0;
    for (let slot = 0; slot < 8760; slot++) {
      const [t = 0, w = 0, p = 0] = [before.dryBulbC[slot], before.humidityRatio[slot], before.pressurePa[slot]];
      if (isMissing(slot) || t < -5) continue;
      compared += 1;
      const wanted = Math.min(100, relativeHumidityPct(t, w, p));
      const found = relativeHumidityPct(after.dryBulbC[slot] ?? Number.NaN, after.humidityRatio[slot] ?? Number.NaN, p);
      // A step of 2e-6 kg/kg is at most 0.08 % RH of saturation at -2 °C.
      if (Math.abs(found - wanted) > 0.09) expect.fail(`slot ${slot}: ${found} %, not ${wanted}`);
    }
    expect(compared).toBeGreaterThan(6000);
  });

  test('with w scaled changes w by the share of its month and no other month', () => {
    const monthly = twelve({}).map((change, month) => ({ ...change, ratioChangePct: month === 6 ? 10 : 0 }));
    const dry = syntheticYear({ at: () => ({ dryBulbC: 30, humidityRatio: 0.01 }) });
    const { humidityRatio } = deriveYear({ parent: dry, monthly, humidityRule: 'ratio-scaled' }).year.packed;
    expect([...new Set(humidityRatio.filter((_ratio, slot) => months[slot] === 7))]).toEqual([5500]);
    expect([...new Set(humidityRatio.filter((_ratio, slot) => months[slot] !== 7))]).toEqual([5000]);
    const { year: kept } = deriveYear({ parent: dry, monthly, humidityRule: 'ratio-kept' });
    expect(sameValues(kept.packed.humidityRatio, dry.packed.humidityRatio)).toBe(true);
  });

  test('counts the hours whose humidity would have passed saturation', () => {
    const halfSaturated = syntheticYear({ at: (slot) => ({ dryBulbC: 20, saturation: slot < 100 ? 1 : 0.5 }) });
    const cappedHours = (input: { monthly: MonthlyChange[]; humidityRule: (typeof humidityRules)[number] }) =>
      deriveYear({ parent: halfSaturated, ...input }).cappedHours;
    // Saturation halves within 12 K: the dry hours pass it only in a much colder air.
    expect(cappedHours({ monthly: warmer(-5), humidityRule: 'ratio-kept' })).toBe(100);
    expect(cappedHours({ monthly: warmer(-15), humidityRule: 'ratio-kept' })).toBe(8760);
    expect(cappedHours({ monthly: warmer(5), humidityRule: 'ratio-kept' })).toBe(0);
    expect(cappedHours({ monthly: warmer(-5), humidityRule: 'rh-kept' })).toBe(0);
    expect(cappedHours({ monthly: twelve({ ratioChangePct: 10 }), humidityRule: 'ratio-scaled' })).toBe(100);
    expect(cappedHours({ monthly: twelve({ ratioChangePct: 110 }), humidityRule: 'ratio-scaled' })).toBe(8760);
  });

  test('is refused on a derived parent and on changes that make no weather, with the months named', () => {
    const input = { parent, monthly: warmer(1), humidityRule: 'ratio-kept' as const };
    const { year: derived } = deriveYear(input);
    expect(() => deriveYear({ ...input, parent: derived })).toThrow('measured parent');
    expect(() => deriveYear({ ...input, monthly: warmer(1).slice(1) })).toThrow('not 11');
    const unknown = warmer(1).map((change, month) =>
      month === 2 || month === 7 ? { ...change, shiftK: Number.NaN } : change,
    );
    expect(() => deriveYear({ ...input, monthly: unknown })).toThrow('no numbers: March, August');
    const turned = twelve({ maxShiftK: -7, minShiftK: 7 });
    expect(() => deriveYear({ ...input, monthly: turned })).toThrow(/January: the swing .*; December: the swing/s);
    expect(() => deriveYear({ ...input, monthly: warmer(60) })).toThrow('July: an hour would reach');
  });
});
