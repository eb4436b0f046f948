/** E01 to E07: stages, water, towers. */
import { readBrief } from '../brief/brief-from-preset.ts';
import {
  dewPointC,
  humidityRatioFromRelativeHumidity,
  relativeHumidityPct,
  volumeM3PerKg,
} from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { humidityRatioOnWetBulbLine } from '../psychrometrics/wet-bulb-line.ts';
import { dewPointPath } from '../stages/dew-point.ts';
import { directPath } from '../stages/direct.ts';
import { indirectPath } from '../stages/indirect.ts';
import { outdoorSecondary } from '../stages/secondary-air.ts';
import type { StagePath, WetOutdoorState } from '../stages/stage-path.ts';
import { twoStagePath } from '../stages/two-stage.ts';
import { makeUpLitres } from '../water-energy/plant-hour.ts';
import { officeForChecks } from './brief-for-checks.ts';
import { exactly, inputOf, printed, within, withinShare } from './check-answer.ts';
import { type CheckRunner, eachCase } from './check-runner.ts';
import { towerBalance } from './comparison-formulas.ts';
import { type CheckAnswer, numberOf, numbersOf, type PublishedCase, textOf } from './published-check.ts';

const NO_FANS = { air: 0, direct: 0, indirect: 0, dewpoint: 0, twostage: 0, returnAir: 0 };
const PA_PER_PSI = 6894.757;

const celsius = (fahrenheit: number): number => (fahrenheit - 32) / 1.8;
const fahrenheit = (tempC: number): number => tempC * 1.8 + 32;

/** The outdoor air that a case gives by dry bulb, wet bulb and pressure. */
function airOf(each: PublishedCase): WetOutdoorState {
  const [dryBulbC, wetC, pressurePa] = [
    numberOf(each, 'dryBulbC'),
    numberOf(each, 'wetBulbC'),
    numberOf(each, 'pressurePa'),
  ];
  const humidityRatio = humidityRatioOnWetBulbLine(dryBulbC, wetC, pressurePa);
  const volume = volumeM3PerKg(dryBulbC, humidityRatio, pressurePa);
  return { dryBulbC, wetBulbC: wetC, pressurePa, humidityRatio, volumeM3PerKg: volume };
}

function airOfRh(state: { dryBulbC: number; relativeHumidityPct: number; pressurePa: number }): WetOutdoorState {
  const { dryBulbC, pressurePa } = state;
  const humidityRatio = humidityRatioFromRelativeHumidity({ ...state, belowZero: 'water' });
  const wetC = wetBulbC(dryBulbC, humidityRatio, pressurePa);
  const volume = volumeM3PerKg(dryBulbC, humidityRatio, pressurePa);
  return { dryBulbC, wetBulbC: wetC, pressurePa, humidityRatio, volumeM3PerKg: volume };
}

/** The least share of wetting, to 1e-6, at which the leaving air is at least this humid. */
function shareForHumidity(path: StagePath, { pct, pressurePa }: { pct: number; pressurePa: number }): number {
  let drier = 0;
  let damper = 1;
  while (damper - drier > 1e-6) {
    const middle = (drier + damper) / 2;
    const { tempC, humidityRatio } = path.at(middle);
    if (relativeHumidityPct(tempC, humidityRatio, pressurePa) < pct) drier = middle;
    else damper = middle;
  }
  return damper;
}

function directInFahrenheit(each: PublishedCase): readonly CheckAnswer[] {
  const pressurePa = numberOf(each, 'pressurePsi') * PA_PER_PSI;
  const dryBulbC = celsius(numberOf(each, 'dryBulbF'));
  const outdoor = airOfRh({ dryBulbC, relativeHumidityPct: numberOf(each, 'relativeHumidityPct'), pressurePa });
  const isWetBulb = textOf(each, 'quantity') === 'wetBulbF';
  const pct = isWetBulb ? 100 : numberOf(each, 'leavingRhPct');
  const path = directPath(outdoor, { fanWPerLs: NO_FANS, effDirect: 1 });
  const foundC = isWetBulb ? outdoor.wetBulbC : path.at(shareForHumidity(path, { pct, pressurePa })).tempC;
  const measured = {
    input: inputOf(each),
    expected: numberOf(each, 'expected'),
    found: fahrenheit(foundC),
    unit: '°F',
  };
  return [within({ ...measured, tag: textOf(each, 'tag') }, numberOf(each, 'tolerance'))];
}

function directStage(each: PublishedCase): readonly CheckAnswer[] {
  const effDirect = numberOf(each, 'effDirect');
  const { tempC, humidityRatio } = directPath(airOf(each), { fanWPerLs: NO_FANS, effDirect }).at(1);
  const rh = relativeHumidityPct(tempC, humidityRatio, numberOf(each, 'pressurePa'));
  const found = new Map([
    ['leavingC', { found: tempC, unit: '°C' }],
    ['leavingGPerKg', { found: 1000 * humidityRatio, unit: 'g/kg' }],
    ['leavingRhPct', { found: rh, unit: '%' }],
  ]).get(textOf(each, 'quantity'));
  if (found === undefined) throw new TypeError('E02 asks for a quantity that is not known');
  const measured = { input: inputOf(each), expected: numberOf(each, 'expected'), ...found, tag: textOf(each, 'tag') };
  return [within(measured, numberOf(each, 'tolerance'))];
}

function twoStages(each: PublishedCase): readonly CheckAnswer[] {
  const outdoor = airOf(each);
  const { dryBulbC, wetBulbC: enteringC, pressurePa } = outdoor;
  const [effIndirect, effDirect] = [numberOf(each, 'effIndirect'), numberOf(each, 'effDirect')];
  const plant = { fanWPerLs: NO_FANS, effIndirect, effDirect, k: 1 };
  const between = indirectPath(outdoor, plant, outdoorSecondary(outdoor)).at(1);
  const leaving = twoStagePath(outdoor, plant, outdoorSecondary(outdoor)).at(1);
  const found = {
    betweenC: between.tempC,
    betweenWetBulbC: wetBulbC(between.tempC, between.humidityRatio, pressurePa),
    leavingC: leaving.tempC,
    overall: (dryBulbC - leaving.tempC) / (dryBulbC - enteringC),
  };
  const words = {
    betweenC: 'after the first stage',
    betweenWetBulbC: 'its wet bulb',
    leavingC: 'after the second',
    overall: 'overall wet-bulb effectiveness',
  };
  const given = inputOf(each, ['betweenC', 'betweenWetBulbC', 'leavingC', 'overall']);
  const kept = between.humidityRatio === outdoor.humidityRatio ? 'kept' : 'changed';
  const ratio = { input: `humidity ratio after the first stage: ${given}`, expected: 'kept', found: kept };
  const temperatures = (['betweenC', 'betweenWetBulbC', 'leavingC', 'overall'] as const).map((name) =>
    within(
      {
        input: `${words[name]}: ${given}`,
        expected: numberOf(each, name),
        found: found[name],
        tag: textOf(each, 'tag'),
        ...(name === 'overall' ? {} : { unit: '°C' }),
      },
      numberOf(each, 'tolerance'),
    ),
  );
  return [...temperatures, exactly({ ...ratio, tag: textOf(each, 'tag') })];
}

function dewPointStage(each: PublishedCase): readonly CheckAnswer[] {
  const outdoor = airOf(each);
  const leaving = dewPointPath(outdoor, { fanWPerLs: NO_FANS, effDewPoint: numberOf(each, 'effDewPoint'), k: 1 }).at(1);
  const tag = textOf(each, 'tag');
  const input = inputOf(each, ['leavingC']);
  const dewC = dewPointC(outdoor.dryBulbC, outdoor.humidityRatio, outdoor.pressurePa);
  const kept = leaving.humidityRatio === outdoor.humidityRatio ? 'kept' : 'changed';
  return [
    within(
      { input, expected: numberOf(each, 'leavingC'), found: leaving.tempC, tag, unit: '°C' },
      numberOf(each, 'tolerance'),
    ),
    exactly({ input: `humidity ratio: ${input}`, expected: 'kept', found: kept, tag }),
    exactly({
      input: `leaving air: ${input}`,
      expected: 'over the dew point',
      found: leaving.tempC > dewC ? 'over the dew point' : 'under it',
      tag,
    }),
  ];
}

function tower(each: PublishedCase): readonly CheckAnswer[] {
  const balance = towerBalance({
    waterKgPerS: numberOf(each, 'waterKgPerS'),
    hotC: numberOf(each, 'hotC'),
    coldC: numberOf(each, 'coldC'),
    enteringC: numberOf(each, 'enteringC'),
    enteringRhPct: numberOf(each, 'enteringRhPct'),
    leavingC: numberOf(each, 'leavingC'),
    pressurePa: numberOf(each, 'pressurePa'),
  });
  const isAir = textOf(each, 'quantity') === 'dryAirKgPerS';
  const found = isAir ? balance.dryAirKgPerS : balance.makeUpKgPerS;
  const input = `${isAir ? 'dry air' : 'water evaporated'}: ${inputOf(each)}`;
  const measured = { input, expected: numberOf(each, 'expected'), found, unit: 'kg/s', tag: textOf(each, 'tag') };
  return [withinShare(measured, numberOf(each, 'tolerancePct') / 100)];
}

/** Water of a direct stage per kWh of sensible cooling, over every state of the range. */
function waterPerKwh(each: PublishedCase): readonly CheckAnswer[] {
  const effDirect = numberOf(each, 'effDirect');
  const found = numbersOf(each, 'dryBulbsC').flatMap((dryBulbC) =>
    numbersOf(each, 'relativeHumiditiesPct').flatMap((pct) =>
      numbersOf(each, 'pressuresPa').map((pressurePa) => {
        const outdoor = airOfRh({ dryBulbC, relativeHumidityPct: pct, pressurePa });
        const leaving = directPath(outdoor, { fanWPerLs: NO_FANS, effDirect }).at(1);
        const sensibleKwh = ((1.006 + 1.86 * outdoor.humidityRatio) * (dryBulbC - leaving.tempC)) / 3600;
        return leaving.evaporatedKgPerKg / sensibleKwh;
      }),
    ),
  );
  const [least, most] = [numberOf(each, 'leastKgPerKwh'), numberOf(each, 'mostKgPerKwh')];
  return [
    {
      input: `${found.length} states, effectiveness ${effDirect}`,
      expected: `${least} to ${most} kg/kWh`,
      tolerance: 'range',
      found: `${printed(Math.min(...found))} to ${printed(Math.max(...found))} kg/kWh`,
      holds: found.length > 0 && found.every((value) => value >= least && value <= most),
      tag: textOf(each, 'tag'),
    },
  ];
}

function bleed(each: PublishedCase): readonly CheckAnswer[] {
  const cycles = numberOf(each, 'cycles');
  const tag = textOf(each, 'tag');
  const input = `cycles of concentration ${cycles}`;
  if (each.bleedPerEvaporated === null) {
    const reading = readBrief({ ...officeForChecks, cycles });
    return [exactly({ input, expected: 'refused', found: reading.ok ? 'taken' : 'refused', tag })];
  }
  const expected = numberOf(each, 'bleedPerEvaporated');
  const found = makeUpLitres(1, { cycles }) - 1;
  // Exact but for the last bits of a division.
  return [within({ input, expected, found, tag, unit: 'of what evaporates' }, 1e-12)];
}

export const coolingChecks: Readonly<Record<string, CheckRunner>> = {
  E01: eachCase(directInFahrenheit),
  E02: eachCase(directStage),
  E03: eachCase(twoStages),
  E04: eachCase(dewPointStage),
  E05: eachCase(tower),
  E06: eachCase(waterPerKwh),
  E07: eachCase(bleed),
};
