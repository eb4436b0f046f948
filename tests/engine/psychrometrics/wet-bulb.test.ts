import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  dewPointC,
  enthalpyKJPerKg,
  humidityRatioFromRelativeHumidity,
  relativeHumidityOfDewPointPct,
  saturationHumidityRatio,
  saturationPressurePa,
} from '#engine/psychrometrics/moist-air.ts';
import { standardPressurePa, stationPressurePa } from '#engine/psychrometrics/pressure.ts';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { tabledDewPointC } from '#engine/psychrometrics/saturation-table.ts';
import { wetBulbC, wetBulbColumn } from '#engine/psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { unpackYear } from '#engine/reduction/packed-columns.ts';
import { propertySettings, samples } from '../../support/sample-size.ts';
import { climates, climateYear } from '../../support/synthetic-climates.ts';

/** Even over the interval: fast-check's own doubles crowd around zero. */
function between(low: number, high: number): fc.Arbitrary<number> {
  return fc.integer({ min: 0, max: 1_000_000 }).map((part) => low + ((high - low) * part) / 1_000_000);
}

const anyState = fc.record({ dryBulbC: between(-40, 60), pct: between(1, 100), pressurePa: between(55_000, 108_000) });

function ratioOf(state: { dryBulbC: number; pct: number; pressurePa: number }): number {
  return humidityRatioFromRelativeHumidity({ ...state, relativeHumidityPct: state.pct, belowZero: 'ice' });
}

describe('wet bulb', () => {
  test('is that of PsychroLib to its bisection of 0.001 K over the whole domain, at least 1 K away from 0 °C', () => {
    let compared = 0;
    let worstK = 0;
    const property = fc.property(anyState, (state) => {
      const ratio = ratioOf(state);
      const wetC = wetBulbC(state.dryBulbC, ratio, state.pressurePa);
      if (Math.abs(wetC) < 1) return true;
      compared++;
      const theirs = psychrolib.GetTWetBulbFromHumRatio(state.dryBulbC, ratio, state.pressurePa);
      worstK = Math.max(worstK, Math.abs(wetC - theirs));
      return worstK <= 0.001;
    });
    const settings = propertySettings(10_000, 664_320);
    fc.assert(property, settings);
    // PsychroLib stops within 0.0005 K of the root; the kernel's own error comes on top.
    expect(worstK).toBeLessThan(0.0006);
    expect(compared).toBeGreaterThan(0.9 * settings.numRuns);
  });

  test('within 1 K of 0 °C satisfies the equation: back to the same humidity ratio to 1e-7', () => {
    let compared = 0;
    const nearZero = fc.record({
      dryBulbC: between(-1, 11),
      aimC: between(-0.99, 0.99),
      pressurePa: between(55_000, 108_000),
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

  test('satisfies the formulas between 0.0001 K below and above it, where one step finishes', () => {
    let compared = 0;
    const property = fc.property(anyState, (state) => {
      const ratio = ratioOf(state);
      const wetC = wetBulbC(state.dryBulbC, ratio, state.pressurePa);
      if (Math.abs(wetC) < 1 || enthalpyKJPerKg(state.dryBulbC, ratio) > 190) return true;
      compared++;
      const over = humidityRatioOnWetBulbLine(state.dryBulbC, wetC + 1e-4, state.pressurePa);
      const under = humidityRatioOnWetBulbLine(state.dryBulbC, wetC - 1e-4, state.pressurePa);
      return under <= ratio + 1e-12 && (ratio <= over || wetC + 1e-4 >= state.dryBulbC);
    });
    const settings = propertySettings(10_000);
    fc.assert(property, settings);
    expect(compared).toBeGreaterThan(0.7 * settings.numRuns);
  });

  test('of a column is that of each single state, to the bit, whatever else the column holds', () => {
    const count = samples(5_000);
    const states = fc.sample(anyState, { numRuns: count, seed: 7 });
    const dryBulbC = Float64Array.from(states, (state) => state.dryBulbC);
    const ratios = Float64Array.from(states, ratioOf);
    const pressurePa = Float64Array.from(states, (state) => state.pressurePa);
    dryBulbC[1] = Number.NaN;
    ratios[2] = Number.NaN;
    pressurePa[3] = Number.NaN;
    const column = wetBulbColumn(dryBulbC, ratios, pressurePa);
    const missing = [...column.keys()].filter((slot) => Number.isNaN(column[slot]));
    expect(missing).toEqual([1, 2, 3]);
    const differing = states.filter((state, slot) => {
      if (missing.includes(slot)) return false;
      return column[slot] !== wetBulbC(state.dryBulbC, ratioOf(state), state.pressurePa);
    });
    expect(differing).toEqual([]);
    expect(column).toHaveLength(count);
  });

  test('holds outside the tables too: thin air, deep frost, air as hot and wet as a dryer', () => {
    let compared = 0;
    for (const pressurePa of [20_000, 29_999, 112_600, 140_000]) {
      for (const dryBulbC of [-99, -85, -30, 5, 45, 58, 90, 105]) {
        for (const pct of [3, 40, 99]) {
          // PsychroLib loses its way where the dry bulb is over the boiling point.
          if (saturationPressurePa(dryBulbC) > pressurePa) continue;
          const ratio = ratioOf({ dryBulbC, pct, pressurePa });
          const wetC = wetBulbC(dryBulbC, ratio, pressurePa);
          if (Math.abs(wetC) < 1) continue;
          compared++;
          const theirs = psychrolib.GetTWetBulbFromHumRatio(dryBulbC, ratio, pressurePa);
          expect(Math.abs(wetC - theirs), `${dryBulbC} °C, ${pct} %, ${pressurePa} Pa`).toBeLessThan(0.001);
        }
      }
    }
    expect(compared).toBeGreaterThan(60);
  });

  test('after an indirect stage is that of PsychroLib to 0.02 K on years of five climates, where it is over 1 °C', () => {
    let compared = 0;
    let worstK = 0;
    for (const climate of climates.slice(0, 5)) {
      const { dryBulbC, humidityRatio, pressurePa } = unpackYear(climateYear(climate).packed);
      const wetC = wetBulbColumn(dryBulbC, humidityRatio, pressurePa);
      const betweenC = dryBulbC.map((dryBulb, slot) => dryBulb - 0.65 * (dryBulb - (wetC[slot] ?? Number.NaN)));
      const second = wetBulbColumn(betweenC, humidityRatio, pressurePa);
      for (let slot = 0; slot < second.length; slot += samples(10, 1)) {
        const ours = second[slot] ?? Number.NaN;
        if (!(ours > 1)) continue;
        compared++;
        const state = [betweenC[slot] ?? 0, humidityRatio[slot] ?? 0, pressurePa[slot] ?? 0] as const;
        worstK = Math.max(worstK, Math.abs(ours - psychrolib.GetTWetBulbFromHumRatio(...state)));
      }
    }
    expect(compared).toBeGreaterThan(samples(2_500, 25_000));
    // The gate is 0.02 K; what is measured is PsychroLib's own stopping error.
    expect(worstK).toBeLessThan(0.001);
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

test('the dew point is that of PsychroLib to its 0.001 K over the whole domain, and the dry bulb of saturated air', () => {
  let worstK = 0;
  const property = fc.property(anyState, (state) => {
    const ratio = ratioOf(state);
    const found = dewPointC(state.dryBulbC, ratio, state.pressurePa);
    const theirs = psychrolib.GetTDewPointFromHumRatio(state.dryBulbC, ratio, state.pressurePa);
    worstK = Math.max(worstK, Math.abs(found - theirs));
    const saturated = saturationHumidityRatio(state.dryBulbC, state.pressurePa);
    const atSaturation = dewPointC(state.dryBulbC, saturated, state.pressurePa);
    return worstK <= 0.001 && found <= state.dryBulbC && Math.abs(atSaturation - state.dryBulbC) < 1e-4;
  });
  fc.assert(property, propertySettings(5_000, 300_000));
  // Read backwards, the table gives back the pressure: an answer that needs no other program.
  for (let tempC = -89; tempC < 69; tempC += 0.37) {
    expect(Math.abs(tabledDewPointC(saturationPressurePa(tempC)) - tempC), `${tempC} °C`).toBeLessThan(1e-4);
  }
});
