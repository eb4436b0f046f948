import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import {
  dewPointC,
  enthalpyKJPerKg,
  humidityRatioFromDewPoint,
  humidityRatioFromRelativeHumidity,
  relativeHumidityOfDewPointPct,
  relativeHumidityPct,
  saturationHumidityRatio,
  saturationPressureOverWaterPa,
  saturationPressurePa,
  volumeM3PerKg,
} from '#engine/psychrometrics/moist-air.ts';
import { standardPressurePa } from '#engine/psychrometrics/pressure.ts';
import { wetBulbC } from '#engine/psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '#engine/psychrometrics/wet-bulb-line.ts';
import { casesOf, rowsOf } from '../support/published-values.ts';
import { propertySettings } from '../support/sample-size.ts';

/** Numbers, sources and tags stand in data/checks/psychrometrics.json; the tolerance is beside each number there. */

function relativeError(value: number, expected: number): number {
  return Math.abs(value / expected - 1);
}

function off(value: number, expected: number): number {
  return Math.abs(value - expected);
}

function wetBulbOfRh(input: { dryBulbC: number; relativeHumidityPct: number; pressurePa: number }): number {
  const ratio = humidityRatioFromRelativeHumidity({ ...input, belowZero: 'ice' });
  return wetBulbC(input.dryBulbC, ratio, input.pressurePa);
}

const pressureCase = { tempC: z.number(), expectedPa: z.number(), relativeTolerance: z.number() };

describe('moist air against published values', () => {
  test('P01 saturation pressure agrees with table 3 of ASHRAE Fundamentals to 3e-4', () => {
    const cases = casesOf('P01', pressureCase);
    expect(cases).toHaveLength(5);
    for (const { expectedPa, relativeTolerance, tempC } of cases) {
      expect(relativeError(saturationPressurePa(tempC), expectedPa), `${tempC} °C`).toBeLessThan(relativeTolerance);
    }
  });

  test('P02 saturation pressure agrees with IAPWS at the triple point and over ice at -40 °C to 5e-4', () => {
    const cases = casesOf('P02', { ...pressureCase, surface: z.enum(['water', 'ice']) });
    expect(cases).toHaveLength(2);
    for (const { expectedPa, relativeTolerance, surface, tempC } of cases) {
      const value = surface === 'water' ? saturationPressureOverWaterPa(tempC) : saturationPressurePa(tempC);
      expect(relativeError(value, expectedPa), `${surface} ${tempC} °C`).toBeLessThan(relativeTolerance);
    }
  });

  test('P03 humidity ratio of saturated air agrees with table 2 of ASHRAE Fundamentals to 1 %', () => {
    const cases = casesOf('P03', { tempC: z.number(), expectedGPerKg: z.number(), relativeTolerance: z.number() });
    expect(cases).toHaveLength(5);
    for (const { expectedGPerKg, relativeTolerance, tempC } of cases) {
      const gPerKg = 1000 * saturationHumidityRatio(tempC, 101_325);
      expect(relativeError(gPerKg, expectedGPerKg), `${tempC} °C`).toBeLessThan(relativeTolerance);
    }
  });

  test('P04 the standard atmosphere agrees with table 1 of ASHRAE Fundamentals to 1 Pa', () => {
    const cases = casesOf('P04', { elevationM: z.number(), expectedPa: z.number(), tolerance: z.number() });
    expect(cases).toHaveLength(5);
    for (const { elevationM, expectedPa, tolerance } of cases) {
      expect(off(standardPressurePa(elevationM), expectedPa), `${elevationM} m`).toBeLessThanOrEqual(tolerance);
    }
  });

  test('P05 air of 40 °C and 20 °C wet bulb has the properties of ASHRAE example 1', () => {
    const ratio = humidityRatioOnWetBulbLine(40, 20, 101_325);
    const found = {
      humidityRatioGPerKg: 1000 * ratio,
      relativeHumidityPct: relativeHumidityPct(40, ratio, 101_325),
      enthalpyKJPerKg: enthalpyKJPerKg(40, ratio),
      volumeM3PerKg: volumeM3PerKg(40, ratio, 101_325),
    };
    const quantity = z.enum(['humidityRatioGPerKg', 'relativeHumidityPct', 'enthalpyKJPerKg', 'volumeM3PerKg']);
    const cases = casesOf('P05', { quantity, expected: z.number(), tolerance: z.number() });
    expect(cases).toHaveLength(5);
    for (const each of cases) {
      expect(off(found[each.quantity], each.expected), each.quantity).toBeLessThanOrEqual(each.tolerance);
    }
  });

  test('P06 the wet bulb of 7 °C at 61 % and 100 kPa is the one in the tests of PsychroLib to 0.004 K', () => {
    const cases = casesOf('P06', {
      dryBulbC: z.number(),
      relativeHumidityPct: z.number(),
      pressurePa: z.number(),
      expectedC: z.number(),
      tolerance: z.number(),
    });
    expect(cases).toHaveLength(1);
    for (const each of cases) expect(off(wetBulbOfRh(each), each.expectedC)).toBeLessThan(each.tolerance);
  });

  test('P07 the humidity ratio of a wet bulb over ice and over water is the one in the tests of PsychroLib to 3e-4', () => {
    const cases = casesOf('P07', {
      dryBulbC: z.number(),
      wetBulbC: z.number(),
      pressurePa: z.number(),
      expected: z.number(),
      relativeTolerance: z.number(),
    });
    expect(cases).toHaveLength(2);
    for (const each of cases) {
      const ratio = humidityRatioOnWetBulbLine(each.dryBulbC, each.wetBulbC, each.pressurePa);
      expect(relativeError(ratio, each.expected), `${each.dryBulbC} °C`).toBeLessThan(each.relativeTolerance);
      // The way back: -5 and 25 °C to 0.001 K, PsychroLib's own tolerance.
      expect(off(wetBulbC(each.dryBulbC, ratio, each.pressurePa), each.wetBulbC)).toBeLessThan(0.001);
    }
  });

  test('P08 the wet bulb agrees with real moist air (IAPWS) to 0.04 K at three pressures, -20 to 50 °C', () => {
    const [table] = casesOf('P08', { file: z.string(), leaveOutWithinK: z.number(), tolerance: z.number() });
    const rows = rowsOf(table?.file ?? '');
    expect(rows).toHaveLength(252);
    const differences = rows.flatMap(([kind, pressure, dryBulb, humidity, , expected]) => {
      const expectedC = Number(expected);
      if (Math.abs(expectedC) <= (table?.leaveOutWithinK ?? 0)) return [];
      const dryBulbC = Number(dryBulb);
      const pressurePa = Number(pressure);
      const ratio =
        kind === 'rh'
          ? humidityRatioFromRelativeHumidity({
              dryBulbC,
              relativeHumidityPct: 100 * Number(humidity),
              pressurePa,
              belowZero: 'ice',
            })
          : humidityRatioFromDewPoint({ dryBulbC, dewPointC: Number(humidity), pressurePa, belowZero: 'ice' });
      return [off(wetBulbC(dryBulbC, ratio, pressurePa), expectedC)];
    });
    expect(differences.length).toBeGreaterThan(240);
    expect(Math.max(...differences)).toBeLessThan(table?.tolerance ?? 0);
  });

  test('P09 the wet bulb at 1609 m is a kelvin under the one at sea level, each to 0.01 K', () => {
    const cases = casesOf('P09', {
      dryBulbC: z.number(),
      relativeHumidityPct: z.number(),
      elevationM: z.number(),
      expectedC: z.number(),
      tolerance: z.number(),
    });
    expect(cases).toHaveLength(2);
    for (const each of cases) {
      const wetC = wetBulbOfRh({ ...each, pressurePa: standardPressurePa(each.elevationM) });
      expect(off(wetC, each.expectedC), `${each.elevationM} m`).toBeLessThan(each.tolerance);
    }
  });

  const states = { states: z.number(), lowPa: z.number(), highPa: z.number(), tolerance: z.number() };
  const anyState = (limits: { lowPa: number; highPa: number }) =>
    fc.record({
      dryBulbC: fc.double({ min: -40, max: 55, noNaN: true }),
      relativeHumidityPct: fc.double({ min: 1, max: 100, noNaN: true }),
      pressurePa: fc.double({ min: limits.lowPa, max: limits.highPa, noNaN: true }),
    });

  test('P10 the wet bulb is the dry bulb at saturation, lies between dew point and dry bulb, and rises with humidity', () => {
    const [limits] = casesOf('P10', states);
    if (limits === undefined) throw new Error('P10 has no case');
    const property = fc.property(anyState(limits), ({ dryBulbC, pressurePa, relativeHumidityPct: pct }) => {
      const saturated = saturationHumidityRatio(dryBulbC, pressurePa);
      const ratio = humidityRatioFromRelativeHumidity({
        dryBulbC,
        relativeHumidityPct: pct,
        pressurePa,
        belowZero: 'ice',
      });
      const wetC = wetBulbC(dryBulbC, ratio, pressurePa);
      return (
        wetBulbC(dryBulbC, saturated, pressurePa) === dryBulbC &&
        wetC <= dryBulbC &&
        wetC >= dewPointC(dryBulbC, ratio, pressurePa) - limits.tolerance &&
        wetBulbC(dryBulbC, ratio * 1.01, pressurePa) >= wetC - limits.tolerance
      );
    });
    fc.assert(property, propertySettings(limits.states));
  });

  test('P11 dry bulb and dew point to humidity ratio and wet bulb and back return the dew point to 0.01 K', () => {
    const [limits] = casesOf('P11', states);
    if (limits === undefined) throw new Error('P11 has no case');
    const property = fc.property(
      anyState(limits),
      fc.double({ min: 0, max: 40, noNaN: true }),
      ({ dryBulbC, pressurePa }, spreadK) => {
        const dewC = Math.max(-60, dryBulbC - spreadK);
        const ratio = humidityRatioFromDewPoint({ dryBulbC, dewPointC: dewC, pressurePa, belowZero: 'ice' });
        const wetC = wetBulbC(dryBulbC, ratio, pressurePa);
        const back = humidityRatioOnWetBulbLine(dryBulbC, wetC, pressurePa);
        return (
          off(dewPointC(dryBulbC, ratio, pressurePa), dewC) < limits.tolerance &&
          // Through the wet bulb the way back carries its bisection error of 0.0005 K.
          off(wetBulbC(dryBulbC, back, pressurePa), wetC) < 0.002
        );
      },
    );
    fc.assert(property, propertySettings(limits.states));
  });

  test('P12 the fit of Stull is the published one to 1e-6, and our wet bulb at sea level lies within its 1.4 K', () => {
    const [published] = casesOf('P12', {
      dryBulbC: z.number(),
      relativeHumidityPct: z.number(),
      expectedC: z.number(),
      tolerance: z.number(),
      boundK: z.number(),
    });
    if (published === undefined) throw new Error('P12 has no case');
    const { boundK, dryBulbC, expectedC, tolerance } = published;
    expect(off(stullWetBulbC(dryBulbC, published.relativeHumidityPct), expectedC)).toBeLessThan(tolerance);
    let compared = 0;
    for (let tempC = 0; tempC <= 50; tempC += 2) {
      for (let pct = 5; pct <= 99; pct += 2) {
        const ours = wetBulbOfRh({ dryBulbC: tempC, relativeHumidityPct: pct, pressurePa: 101_325 });
        expect(off(ours, stullWetBulbC(tempC, pct)), `${tempC} °C, ${pct} %`).toBeLessThan(boundK);
        compared++;
      }
    }
    expect(compared).toBe(26 * 48);
  });

  test('P13 relative humidity of a depression agrees with the psychrometer equation to 1.3 points', () => {
    const cases = casesOf('P13', {
      dryBulbC: z.number(),
      depressionK: z.number(),
      expectedPct: z.number(),
      tolerance: z.number(),
    });
    expect(cases).toHaveLength(4);
    for (const { depressionK, dryBulbC, expectedPct, tolerance } of cases) {
      const wetC = dryBulbC - depressionK;
      const vapourPa = saturationPressurePa(wetC) - PSYCHROMETER_PER_K * 101_325 * depressionK;
      expect(off((100 * vapourPa) / saturationPressurePa(dryBulbC), expectedPct), 'the equation').toBeLessThan(0.06);
      const ratio = humidityRatioOnWetBulbLine(dryBulbC, wetC, 101_325);
      expect(off(relativeHumidityPct(dryBulbC, ratio, 101_325), expectedPct)).toBeLessThan(tolerance);
    }
  });

  test('P14 published dew points and humidity ratios at nine elevations agree to 0.12 g/kg', () => {
    const cases = casesOf('P14', {
      station: z.string(),
      elevationM: z.number(),
      dewPointC: z.number(),
      expectedGPerKg: z.number(),
      tolerance: z.number(),
    });
    expect(cases).toHaveLength(9);
    for (const each of cases) {
      const gPerKg = 1000 * saturationHumidityRatio(each.dewPointC, standardPressurePa(each.elevationM));
      expect(off(gPerKg, each.expectedGPerKg), each.station).toBeLessThan(each.tolerance);
    }
  });

  test('P15 below 0 °C the rows of Chicago mean saturation over water to 1 point, and not over ice', () => {
    const cases = casesOf('P15', {
      dryBulbC: z.number(),
      dewPointC: z.number(),
      expectedPct: z.number(),
      tolerance: z.number(),
    });
    expect(cases).toHaveLength(3);
    for (const each of cases) {
      const water = relativeHumidityOfDewPointPct(each.dryBulbC, each.dewPointC, 'water');
      const ice = relativeHumidityOfDewPointPct(each.dryBulbC, each.dewPointC, 'ice');
      expect(off(water, each.expectedPct), `${each.dryBulbC} °C`).toBeLessThan(each.tolerance);
      expect(off(ice, each.expectedPct), `${each.dryBulbC} °C`).toBeGreaterThan(each.tolerance);
    }
  });
});

/** Per K, of a published automatic-station manual. */
const PSYCHROMETER_PER_K = 6.62e-4;

/** Stull 2011, J. Appl. Meteor. Climatol. 50, 2267, at 101.325 kPa; a comparison only, never used by the product. */
function stullWetBulbC(tempC: number, pct: number): number {
  return (
    tempC * Math.atan(0.151977 * Math.sqrt(pct + 8.313659)) +
    Math.atan(tempC + pct) -
    Math.atan(pct - 1.676331) +
    0.00391838 * pct ** 1.5 * Math.atan(0.023101 * pct) -
    4.686035
  );
}
