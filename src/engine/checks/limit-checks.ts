/** C01 to C05: adaptive comfort, data halls, animal houses. */
import { adaptiveLimit } from '../hour-classes/adaptive-limit.ts';
import { capsHold } from '../hour-classes/caps.ts';
import { temperatureHumidityIndex } from '../hour-classes/index-limit.ts';
import {
  dewPointC,
  humidityRatioFromDewPoint,
  humidityRatioFromRelativeHumidity,
} from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { exactly, inputOf, within } from './check-answer.ts';
import { type CheckRunner, eachCase } from './check-runner.ts';
import { broilerIndex } from './comparison-formulas.ts';
import { type CheckAnswer, groupOf, numberOf, type PublishedCase, textOf } from './published-check.ts';

const models = ['ashrae55-80', 'ashrae55-90', 'en16798-i', 'en16798-ii', 'en16798-iii'] as const;

function adaptive(anyModel: (typeof models)[number]): CheckRunner {
  return eachCase((each) => {
    const runningMeanC = numberOf(each, 'runningMeanC');
    const [tag, tolerance] = [textOf(each, 'tag'), numberOf(each, 'tolerance')];
    const input = `running mean ${runningMeanC} °C`;
    const found = adaptiveLimit(anyModel, runningMeanC);
    const said = (outside: boolean) => (outside ? 'outside the range' : 'in the range');
    const answers: CheckAnswer[] = [
      exactly({ input, expected: said(each.outsideRange === true), found: said(found.outsideRange), tag }),
    ];
    if (each.comfortC !== null) {
      const expected = numberOf(each, 'comfortC');
      answers.push(
        within({ input: `comfort at ${input}`, expected, found: found.comfortC, tag, unit: '°C' }, tolerance),
      );
    }
    const upper = groupOf(each, 'upperC');
    for (const model of models) {
      if (upper[model] === undefined) continue;
      const { upperC } = adaptiveLimit(model, runningMeanC);
      const measured = { input: `limit ${model} at ${input}`, expected: numberOf(upper, model), found: upperC };
      answers.push(within({ ...measured, tag, unit: '°C' }, tolerance));
    }
    return answers;
  });
}

function hallEnvelope(each: PublishedCase): readonly CheckAnswer[] {
  const dryBulbC = numberOf(each, 'dryBulbC');
  const pressurePa = numberOf(each, 'pressurePa');
  const pct = numberOf(each, 'relativeHumidityPct');
  const air = { dryBulbC, relativeHumidityPct: pct, pressurePa, belowZero: 'water' } as const;
  const humidityRatio = humidityRatioFromRelativeHumidity(air);
  const caps = { supplyRhPct: numberOf(each, 'supplyRhPct'), supplyDewPointC: numberOf(each, 'supplyDewPointC') };
  const supply = { tempC: dryBulbC, humidityRatio, pressurePa, supplyAimC: dryBulbC, roomRiseK: 0 };
  const said = (passes: boolean) => (passes ? 'passes' : 'fails');
  const tag = textOf(each, 'tag');
  const input = inputOf(each, ['passes', 'dewPointC']);
  const found = said(capsHold(supply, { caps, dwRoomKgKg: 0 }));
  const answers = [exactly({ input, expected: said(each.passes === true), found, tag })];
  if (each.dewPointC !== null) {
    const measured = { expected: numberOf(each, 'dewPointC'), found: dewPointC(dryBulbC, humidityRatio, pressurePa) };
    // Printed to a tenth.
    answers.push(within({ ...measured, input: `dew point: ${input}`, tag, unit: '°C' }, 0.05));
  }
  return answers;
}

function broilers(each: PublishedCase): readonly CheckAnswer[] {
  const [dryBulbC, pressurePa] = [numberOf(each, 'dryBulbC'), numberOf(each, 'pressurePa')];
  const air = { dryBulbC, dewPointC: numberOf(each, 'dewPointC'), pressurePa, belowZero: 'water' } as const;
  const wetC = wetBulbC(dryBulbC, humidityRatioFromDewPoint(air), pressurePa);
  const found = broilerIndex({ dryBulbC, wetBulbC: wetC, airSpeedMPerS: numberOf(each, 'airSpeedMPerS') });
  const measured = { input: inputOf(each), expected: numberOf(each, 'expected'), found, tag: textOf(each, 'tag') };
  return [within(measured, numberOf(each, 'tolerance'))];
}

export const limitChecks: Readonly<Record<string, CheckRunner>> = {
  C01: adaptive('ashrae55-80'),
  C02: adaptive('en16798-i'),
  C03: eachCase(hallEnvelope),
  C04: eachCase((each) => {
    const found = temperatureHumidityIndex(numberOf(each, 'dryBulbC'), numberOf(each, 'relativeHumidityPct'));
    const measured = { input: inputOf(each), expected: numberOf(each, 'expected'), found, tag: textOf(each, 'tag') };
    return [within(measured, numberOf(each, 'tolerance'))];
  }),
  C05: eachCase(broilers),
};
