/** P01 to P15: moist air. One entry per check, kept in one place though it is a long one. */
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
} from '../psychrometrics/moist-air.ts';
import { standardPressurePa } from '../psychrometrics/pressure.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '../psychrometrics/wet-bulb-line.ts';
import { inputOf, printed, within, withinShare } from './check-answer.ts';
import type { CheckRunner } from './check-runner.ts';
import { eachCase } from './check-runner.ts';
import { psychrometerRhPct, stullWetBulbC } from './comparison-formulas.ts';
import { type CheckAnswer, numberOf, type PublishedCase, textOf } from './published-check.ts';
import { mostOver, randomAir } from './random-air.ts';

const SEA_LEVEL_PA = 101_325;

function wetBulbOfRhC(input: { dryBulbC: number; relativeHumidityPct: number; pressurePa: number }): number {
  return wetBulbC(input.dryBulbC, humidityRatioFromRelativeHumidity({ ...input, belowZero: 'ice' }), input.pressurePa);
}

/** A value of one temperature and one expected number, within a share of it. */
function shareAt(expectedName: string, value: (each: PublishedCase, tempC: number) => number, unit: string) {
  return eachCase((each) => [
    withinShare(
      {
        input: inputOf(each),
        expected: numberOf(each, expectedName),
        found: value(each, numberOf(each, 'tempC')),
        tag: textOf(each, 'tag'),
        unit,
      },
      numberOf(each, 'relativeTolerance'),
    ),
  ]);
}

const air40 = () => {
  const ratio = humidityRatioOnWetBulbLine(40, 20, SEA_LEVEL_PA);
  return {
    humidityRatioGPerKg: { value: 1000 * ratio, unit: 'g/kg' },
    relativeHumidityPct: { value: relativeHumidityPct(40, ratio, SEA_LEVEL_PA), unit: '%' },
    enthalpyKJPerKg: { value: enthalpyKJPerKg(40, ratio), unit: 'kJ/kg' },
    volumeM3PerKg: { value: volumeM3PerKg(40, ratio, SEA_LEVEL_PA), unit: 'm³/kg' },
  };
};

function propertiesOfAir40(each: PublishedCase): readonly CheckAnswer[] {
  const quantity = textOf(each, 'quantity');
  const found = Object.entries(air40()).find(([name]) => name === quantity)?.[1];
  if (found === undefined) throw new TypeError(`P05 asks for ${quantity}`);
  const input = `${inputOf({ [quantity]: '' }).trim()} of 40 °C dry bulb, 20 °C wet bulb, 101325 Pa`;
  const measured = { input, expected: numberOf(each, 'expected'), found: found.value, unit: found.unit };
  return [within({ ...measured, tag: textOf(each, 'tag') }, numberOf(each, 'tolerance'))];
}

function goldenWetBulb(each: PublishedCase, table: string): readonly CheckAnswer[] {
  const leaveOutK = numberOf(each, 'leaveOutWithinK');
  const rows = table.trim().split('\n').slice(1);
  const differencesK = rows.flatMap((row) => {
    const [kind, pressure, dryBulb, humidity, , expected] = row.split(',');
    const expectedC = Number(expected);
    if (Math.abs(expectedC) <= leaveOutK) return [];
    const air = { dryBulbC: Number(dryBulb), pressurePa: Number(pressure), belowZero: 'ice' } as const;
    const ratio =
      kind === 'rh'
        ? humidityRatioFromRelativeHumidity({ ...air, relativeHumidityPct: 100 * Number(humidity) })
        : humidityRatioFromDewPoint({ ...air, dewPointC: Number(humidity) });
    return [Math.abs(wetBulbC(air.dryBulbC, ratio, air.pressurePa) - expectedC)];
  });
  return [
    mostOver({
      input: `${differencesK.length} of ${rows.length} states, -20 to 50 °C at three pressures`,
      expected: 'the wet bulb of the table',
      differences: differencesK,
      most: numberOf(each, 'tolerance'),
      tag: textOf(each, 'tag'),
      unit: 'K',
    }),
  ];
}

/** By how much a state breaks an order that must hold, K; 0 where it holds. */
function disorderK(state: { dryBulbC: number; relativeHumidityPct: number; pressurePa: number }): number {
  const { dryBulbC, pressurePa } = state;
  const ratio = humidityRatioFromRelativeHumidity({ ...state, belowZero: 'ice' });
  const wetC = wetBulbC(dryBulbC, ratio, pressurePa);
  const atSaturationC = wetBulbC(dryBulbC, saturationHumidityRatio(dryBulbC, pressurePa), pressurePa);
  return Math.max(
    Math.abs(atSaturationC - dryBulbC),
    wetC - dryBulbC,
    dewPointC(dryBulbC, ratio, pressurePa) - wetC,
    wetC - wetBulbC(dryBulbC, ratio * 1.01, pressurePa),
  );
}

function wayBackK(state: { dryBulbC: number; relativeHumidityPct: number; pressurePa: number }): number {
  const { dryBulbC, pressurePa } = state;
  // The humidity draws how far the dew point lies under the dry bulb: 0 to 40 K.
  const dewC = Math.max(-60, dryBulbC - 0.4 * (100 - state.relativeHumidityPct));
  const ratio = humidityRatioFromDewPoint({ dryBulbC, dewPointC: dewC, pressurePa, belowZero: 'ice' });
  const wetC = wetBulbC(dryBulbC, ratio, pressurePa);
  const back = humidityRatioOnWetBulbLine(dryBulbC, wetC, pressurePa);
  return Math.max(
    Math.abs(dewPointC(dryBulbC, ratio, pressurePa) - dewC),
    // Through the wet bulb the way back carries the error of the one step.
    Math.abs(wetBulbC(dryBulbC, back, pressurePa) - wetC),
  );
}

function overRandomAir(
  expected: string,
  differenceK: (state: { dryBulbC: number; relativeHumidityPct: number; pressurePa: number }) => number,
): CheckRunner {
  return eachCase((each) => {
    const limits = { low: numberOf(each, 'lowPa'), high: numberOf(each, 'highPa') };
    const states = randomAir({ states: numberOf(each, 'states'), pressurePa: limits });
    return [
      mostOver({
        input: `${states.length} random states, -40 to 55 °C, 1 to 100 %, ${limits.low} to ${limits.high} Pa`,
        expected,
        differences: states.map(differenceK),
        most: numberOf(each, 'tolerance'),
        tag: textOf(each, 'tag'),
        unit: 'K',
      }),
    ];
  });
}

function stull(each: PublishedCase): readonly CheckAnswer[] {
  const [dryBulbC, pct] = [numberOf(each, 'dryBulbC'), numberOf(each, 'relativeHumidityPct')];
  const tag = textOf(each, 'tag');
  const fit = stullWetBulbC(dryBulbC, pct);
  const input = `the fit itself, dry bulb ${dryBulbC} °C, relative humidity ${pct} %`;
  const differencesK: number[] = [];
  for (let tempC = 0; tempC <= 50; tempC += 2) {
    for (let rh = 5; rh <= 99; rh += 2) {
      const ours = wetBulbOfRhC({ dryBulbC: tempC, relativeHumidityPct: rh, pressurePa: SEA_LEVEL_PA });
      differencesK.push(Math.abs(ours - stullWetBulbC(tempC, rh)));
    }
  }
  return [
    within({ input, expected: numberOf(each, 'expectedC'), found: fit, tag, unit: '°C' }, numberOf(each, 'tolerance')),
    mostOver({
      input: `our wet bulb over ${differencesK.length} states at sea level`,
      expected: 'the fit',
      differences: differencesK,
      most: numberOf(each, 'boundK'),
      tag,
      unit: 'K',
    }),
  ];
}

function belowZero(each: PublishedCase): readonly CheckAnswer[] {
  const at = (phase: 'water' | 'ice') =>
    relativeHumidityOfDewPointPct(numberOf(each, 'dryBulbC'), numberOf(each, 'dewPointC'), phase);
  const [expected, tolerance] = [numberOf(each, 'expectedPct'), numberOf(each, 'tolerance')];
  const over = { input: `${inputOf(each)}, over water`, expected, found: at('water'), unit: '%' };
  const apart = Math.abs(at('ice') - expected);
  return [
    within({ ...over, tag: textOf(each, 'tag') }, tolerance),
    {
      input: `${inputOf(each)}, over ice`,
      expected: `not ${expected} %`,
      tolerance: `more than ${tolerance} off`,
      found: `${printed(at('ice'))} %`,
      holds: apart > tolerance,
      tag: textOf(each, 'tag'),
    },
  ];
}

function wetBulbAt(each: PublishedCase, pressurePa: number): readonly CheckAnswer[] {
  const state = { dryBulbC: numberOf(each, 'dryBulbC'), relativeHumidityPct: numberOf(each, 'relativeHumidityPct') };
  const found = wetBulbOfRhC({ ...state, pressurePa });
  const measured = { input: inputOf(each), expected: numberOf(each, 'expectedC'), found, unit: '°C' };
  return [within({ ...measured, tag: textOf(each, 'tag') }, numberOf(each, 'tolerance'))];
}

function onWetBulbLine(each: PublishedCase): readonly CheckAnswer[] {
  const [dryC, wetC, pressurePa] = [
    numberOf(each, 'dryBulbC'),
    numberOf(each, 'wetBulbC'),
    numberOf(each, 'pressurePa'),
  ];
  const ratio = humidityRatioOnWetBulbLine(dryC, wetC, pressurePa);
  const tag = textOf(each, 'tag');
  return [
    withinShare(
      { input: inputOf(each), expected: numberOf(each, 'expected'), found: ratio, tag, unit: 'kg/kg' },
      numberOf(each, 'relativeTolerance'),
    ),
    // PsychroLib's own tolerance.
    within(
      { input: 'and back to its wet bulb', expected: wetC, found: wetBulbC(dryC, ratio, pressurePa), tag, unit: '°C' },
      0.001,
    ),
  ];
}

function psychrometer(each: PublishedCase): readonly CheckAnswer[] {
  const [dryBulbC, depressionK] = [numberOf(each, 'dryBulbC'), numberOf(each, 'depressionK')];
  const expected = numberOf(each, 'expectedPct');
  const ratio = humidityRatioOnWetBulbLine(dryBulbC, dryBulbC - depressionK, SEA_LEVEL_PA);
  const shared = { input: inputOf(each), expected, unit: '%', tag: textOf(each, 'tag') };
  const equation = psychrometerRhPct({ dryBulbC, depressionK });
  return [
    // Printed to a tenth of a point.
    within({ ...shared, input: `the equation itself, ${inputOf(each)}`, found: equation }, 0.06),
    within({ ...shared, found: relativeHumidityPct(dryBulbC, ratio, SEA_LEVEL_PA) }, numberOf(each, 'tolerance')),
  ];
}

export const moistAirChecks: Readonly<Record<string, CheckRunner>> = {
  P01: shareAt('expectedPa', (_each, tempC) => saturationPressurePa(tempC), 'Pa'),
  P02: shareAt(
    'expectedPa',
    (each, tempC) =>
      textOf(each, 'surface') === 'water' ? saturationPressureOverWaterPa(tempC) : saturationPressurePa(tempC),
    'Pa',
  ),
  P03: shareAt('expectedGPerKg', (_each, tempC) => 1000 * saturationHumidityRatio(tempC, SEA_LEVEL_PA), 'g/kg'),
  P04: eachCase((each) => {
    const found = standardPressurePa(numberOf(each, 'elevationM'));
    const measured = { input: inputOf(each), expected: numberOf(each, 'expectedPa'), found, unit: 'Pa' };
    return [within({ ...measured, tag: textOf(each, 'tag') }, numberOf(each, 'tolerance'))];
  }),
  P05: eachCase(propertiesOfAir40),
  P06: eachCase((each) => wetBulbAt(each, numberOf(each, 'pressurePa'))),
  P07: eachCase(onWetBulbLine),
  P08: eachCase((each, tables) => goldenWetBulb(each, tables[textOf(each, 'file')] ?? '')),
  P09: eachCase((each) => wetBulbAt(each, standardPressurePa(numberOf(each, 'elevationM')))),
  P10: overRandomAir('the order of the definition', disorderK),
  P11: overRandomAir('the dew point that went in', wayBackK),
  P12: eachCase(stull),
  P13: eachCase(psychrometer),
  P14: eachCase((each) => {
    const pressurePa = standardPressurePa(numberOf(each, 'elevationM'));
    const found = 1000 * saturationHumidityRatio(numberOf(each, 'dewPointC'), pressurePa);
    const measured = { input: inputOf(each), expected: numberOf(each, 'expectedGPerKg'), found, unit: 'g/kg' };
    return [within({ ...measured, tag: textOf(each, 'tag') }, numberOf(each, 'tolerance'))];
  }),
  P15: eachCase(belowZero),
};
