import { expect, test } from 'vitest';
import {
  humidityRatioColumn,
  humidityRatioFromDewPoint,
  humidityRatioFromRelativeHumidity,
  relativeHumidityPct,
  saturationHumidityRatio,
  saturationPressurePa,
} from '#engine/psychrometrics/moist-air.ts';
import { psychrolib } from '#engine/psychrometrics/psychrolib-si.ts';
import { samples } from '../../support/sample-size.ts';

/** -100 to 200 °C: the hundredths, where a file's values stand, and temperatures between them, each asked again at once. */
const temperaturesC = Array.from({ length: 30_001 }, (_none, place) => (place - 10_000) / 100).flatMap(
  (tempC, place) => {
    const between = Math.min(tempC + ((place * 7919) % 9973) / 997_300, 200);
    return [tempC, tempC, between, tempC];
  },
);

test('saturation pressure is that of PsychroLib to the bit from -100 to 200 °C, asked once or again', () => {
  const differing = temperaturesC.filter((tempC) => saturationPressurePa(tempC) !== psychrolib.GetSatVapPres(tempC));
  expect(differing).toEqual([]);
  expect(temperaturesC.length).toBe(120_004);
});

test('humidity ratios and relative humidity are those of PsychroLib to the bit over the whole domain', () => {
  const differing: string[] = [];
  for (const pressurePa of [55_000, 84_556.3, 101_325, 108_000]) {
    for (const dryBulbC of temperaturesC.filter((tempC, at) => Math.abs(tempC) <= 60 && at % samples(23, 1) === 0)) {
      const saturated = saturationHumidityRatio(dryBulbC, pressurePa);
      const dewC = Math.max(-100, dryBulbC - 17.3);
      const state = { dryBulbC, pressurePa, belowZero: 'ice' as const };
      const ofDew = humidityRatioFromDewPoint({ ...state, dewPointC: dewC });
      const ofRelative = humidityRatioFromRelativeHumidity({ ...state, relativeHumidityPct: 37 });
      const same =
        saturated === psychrolib.GetSatHumRatio(dryBulbC, pressurePa) &&
        ofDew === psychrolib.GetHumRatioFromTDewPoint(dewC, pressurePa) &&
        ofRelative === psychrolib.GetHumRatioFromRelHum(dryBulbC, 0.37, pressurePa) &&
        relativeHumidityPct(dryBulbC, ofDew, pressurePa) ===
          100 * psychrolib.GetRelHumFromHumRatio(dryBulbC, ofDew, pressurePa);
      if (!same) differing.push(`${dryBulbC} °C, ${pressurePa} Pa`);
    }
  }
  expect(differing).toEqual([]);
});

test.each(['ice', 'water'] as const)(
  'a column of humidity ratios over %s is that of each hour to the bit',
  (belowZero) => {
    const apartK = [-3, -0.5, 0, 1e-9, 0.0005, 0.001, 0.0011, 0.1, 4.7, 30];
    const dryBulbsC = temperaturesC.filter((tempC, at) => Math.abs(tempC) <= 60 && at % samples(7, 1) === 0);
    const pairs = dryBulbsC.flatMap((dryBulb) => apartK.map((apart) => [dryBulb, dryBulb - apart] as const));
    const column = (value: (pair: readonly [number, number], at: number) => number) => Float64Array.from(pairs, value);
    const dryBulbC = column(([dryBulb], at) => (at % 101 === 0 ? Number.NaN : dryBulb));
    const dewPointC = column(([, dewPoint], at) => (at % 103 === 0 ? Number.NaN : dewPoint));
    const pressurePa = column((_pair, at) => (at % 107 === 0 ? Number.NaN : 60_000 + (at % 48_000)));
    const ratios = humidityRatioColumn({ dryBulbC, dewPointC, pressurePa, belowZero });
    const wrong = ratios.findIndex((ratio, at) => {
      const [dryBulb = 0, dewPoint = 0, pressure = 0] = [dryBulbC[at], dewPointC[at], pressurePa[at]];
      const known = !Number.isNaN(dryBulb + dewPoint + pressure);
      const state = { dryBulbC: dryBulb, dewPointC: dewPoint, pressurePa: pressure, belowZero };
      return !Object.is(ratio, known ? humidityRatioFromDewPoint(state) : Number.NaN);
    });
    expect(wrong).toBe(-1);
    expect(ratios.length).toBeGreaterThan(50_000);
  },
);

test('a temperature outside the formulas is an error, and so is one that is not known', () => {
  for (const tempC of [-100.01, 200.01, Number.NaN, 1e12])
    expect(() => saturationPressurePa(tempC)).toThrow(/outside range/);
});
