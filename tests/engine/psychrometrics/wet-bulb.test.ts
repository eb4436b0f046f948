import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  enthalpyKJPerKg,
  humidityRatioFromRelativeHumidity,
  relativeHumidityOfDewPointPct,
  saturationHumidityRatio,
} from '#engine/psychrometrics/moist-air.ts';
import { standardPressurePa, stationPressurePa } from '#engine/psychrometrics/pressure.ts';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { propertySettings } from '../../support/sample-size.ts';

const anyState = fc.record({
  dryBulbC: fc.double({ min: -40, max: 60, noNaN: true }),
  pct: fc.double({ min: 1, max: 100, noNaN: true }),
  pressurePa: fc.double({ min: 55_000, max: 108_000, noNaN: true }),
});

function ratioOf(state: { dryBulbC: number; pct: number; pressurePa: number }): number {
  return humidityRatioFromRelativeHumidity({ ...state, relativeHumidityPct: state.pct, belowZero: 'ice' });
}

describe('wet bulb', () => {
  test('is that of PsychroLib to its bisection of 0.001 K, at least 1 K away from 0 °C', () => {
    let compared = 0;
    const property = fc.property(anyState, (state) => {
      const ratio = ratioOf(state);
      const wetC = wetBulbC(state.dryBulbC, ratio, state.pressurePa);
      if (Math.abs(wetC) < 1) return true;
      compared++;
      const theirs = psychrolib.GetTWetBulbFromHumRatio(state.dryBulbC, ratio, state.pressurePa);
      return Math.abs(wetC - theirs) <= 0.001;
    });
    const settings = propertySettings(3_000);
    fc.assert(property, settings);
    expect(compared).toBeGreaterThan(0.9 * settings.numRuns);
  });

  test('within 1 K of 0 °C satisfies the equation: back to the same humidity ratio to 1e-7', () => {
    let compared = 0;
    const nearZero = fc.record({
      dryBulbC: fc.double({ min: -1, max: 11, noNaN: true }),
      aimC: fc.double({ min: -0.99, max: 0.99, noNaN: true }),
      pressurePa: fc.double({ min: 55_000, max: 108_000, noNaN: true }),
    });
    const property = fc.property(nearZero, ({ aimC, dryBulbC, pressurePa }) => {
      const ratio = humidityRatioOnWetBulbLine(dryBulbC, Math.min(aimC, dryBulbC), pressurePa);
      const wetC = wetBulbC(dryBulbC, ratio, pressurePa);
      if (ratio < 1e-6 || wetC === dryBulbC) return true;
      compared++;
      return Math.abs(humidityRatioOnWetBulbLine(dryBulbC, wetC, pressurePa) - ratio) < 1e-7;
    });
    const settings = propertySettings(3_000);
    fc.assert(property, settings);
    // The rest are states that would need less than no moisture.
    expect(compared).toBeGreaterThan(0.1 * settings.numRuns);
  });

  test('takes the water root exactly when the enthalpy reaches that of vapour at 0 °C, at any pressure in the limits', () => {
    let water = 0;
    let ice = 0;
    const wrong: string[] = [];
    for (const pressurePa of [31_000, 55_000, 84_556, 101_325, 110_000]) {
      const threshold = 2501 * saturationHumidityRatio(0, pressurePa);
      for (let dryBulbC = 0.5; dryBulbC <= 30; dryBulbC += 0.5) {
        for (let pct = 1; pct < 100; pct += 1) {
          const ratio = ratioOf({ dryBulbC, pct, pressurePa });
          const surplus = enthalpyKJPerKg(dryBulbC, ratio) - threshold;
          if (Math.abs(surplus) < 0.002) continue;
          const wetC = wetBulbC(dryBulbC, ratio, pressurePa);
          if (wetC >= 0 !== surplus > 0) wrong.push(`${dryBulbC} °C, ${pct} %, ${pressurePa} Pa: ${wetC} °C`);
          if (surplus > 0) water++;
          else ice++;
        }
      }
    }
    expect(wrong).toEqual([]);
    expect(water).toBeGreaterThan(20_000);
    expect(ice).toBeGreaterThan(1_000);
  });

  test('rises steadily with humidity across 0 °C, where PsychroLib jumps back and forth', () => {
    let previous = Number.NEGATIVE_INFINITY;
    let drops = 0;
    for (let ratio = 0; ratio < 0.004; ratio += 1e-6) {
      const wetC = wetBulbC(10, ratio, 101_325);
      if (wetC < previous - 0.001) drops++;
      previous = wetC;
    }
    expect(drops).toBe(0);
  });

  test('of an unknown state is an error that names the state', () => {
    expect(() => wetBulbC(Number.NaN, 0.01, 101_325)).toThrow(/wet bulb of a state that is not known: NaN °C/);
    expect(() => wetBulbC(20, 0.01, Number.POSITIVE_INFINITY)).toThrow(RangeError);
  });

  test('of a state over saturation is its dry bulb', () => {
    expect(wetBulbC(20, 1.05 * saturationHumidityRatio(20, 90_000), 90_000)).toBe(20);
    expect(wetBulbC(-15, 0.01, 90_000)).toBe(-15);
  });
});

test('humidity over water and over ice agree above 0 °C and part below it', () => {
  expect(relativeHumidityOfDewPointPct(20, 10, 'water')).toBeCloseTo(relativeHumidityOfDewPointPct(20, 10, 'ice'), 10);
  // Over water a dew point of -10 °C means 10.2 % more vapour than over ice: es 286.5 against 259.9 Pa (from memory).
  const ratio = relativeHumidityOfDewPointPct(20, -10, 'water') / relativeHumidityOfDewPointPct(20, -10, 'ice');
  expect(ratio).toBeCloseTo(1.1026, 3);
});

test('station pressure from sea-level pressure is the standard atmosphere for standard air to 5 Pa up to 2500 m', () => {
  // PsychroLib's own reduction agrees with the formula within 5 Pa to 2,500 m (computed).
  for (const elevationM of [0, 500, 1460, 2500]) {
    const dryBulbC = 15 - 0.0065 * elevationM;
    const pressurePa = stationPressurePa({ seaLevelPressurePa: 101_325, dryBulbC, elevationM });
    expect(Math.abs(pressurePa - standardPressurePa(elevationM)), `${elevationM} m`).toBeLessThan(5);
  }
  expect(standardPressurePa(-34)).toBeGreaterThan(101_325);
});
