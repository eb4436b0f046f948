/** D01, D02, D05: design values and counting; F01, F02: other climates and heights. */
import { briefFromPreset } from '../brief/brief-from-preset.ts';
import { adjustToHeight } from '../climate/adjust-to-height.ts';
import { shiftedAndStretchedC, stretchOf } from '../climate/monthly-change.ts';
import { floatColumn } from '../float-column.ts';
import { dewPointC, humidityRatioFromDewPoint, relativeHumidityPct } from '../psychrometrics/moist-air.ts';
import { wetBulbC } from '../psychrometrics/wet-bulb.ts';
import { valueAtPercent } from '../reduction/design-values.ts';
import { packYear, unpackYear } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import { judgeYear } from '../run/judge-year.ts';
import { officeForChecks } from './brief-for-checks.ts';
import { exactly, inputOf, within, withinShare } from './check-answer.ts';
import { type CheckRunner, eachCase } from './check-runner.ts';
import { extremeFactor } from './comparison-formulas.ts';
import { type CheckAnswer, groupOf, numberOf, numbersOf, type PublishedCase, textOf } from './published-check.ts';

const SLOTS = 8760;

/** A year of one state in every slot but those without weather. */
function steadyYear(
  air: { dryBulbC: number; humidityRatio: number; pressurePa: number },
  { slots = SLOTS, isMissing = () => false }: { slots?: number; isMissing?: (slot: number) => boolean } = {},
): WeatherYear {
  const column = (value: number) => floatColumn(slots, (slot) => (isMissing(slot) ? Number.NaN : value));
  return {
    kind: 'typical',
    year: null,
    utcOffsetMin: 0,
    packed: packYear({
      dryBulbC: column(air.dryBulbC),
      humidityRatio: column(air.humidityRatio),
      pressurePa: column(air.pressurePa),
      flags: new Uint8Array(slots),
    }),
  };
}

function extremes(each: PublishedCase): readonly CheckAnswer[] {
  const sign = textOf(each, 'extreme') === 'maximum' ? 1 : -1;
  const expectedC = numbersOf(each, 'expectedC');
  return numbersOf(each, 'years').map((years, index) =>
    within(
      {
        input: `${textOf(each, 'station')}, ${textOf(each, 'extreme')} in ${years} years, mean ${numberOf(each, 'meanC')} °C, deviation ${numberOf(each, 'deviationK')} K`,
        expected: expectedC[index] ?? Number.NaN,
        found: numberOf(each, 'meanC') + sign * extremeFactor(years) * numberOf(each, 'deviationK'),
        tag: textOf(each, 'tag'),
        unit: '°C',
      },
      numberOf(each, 'tolerance'),
    ),
  );
}

/** The values 8760 downwards to 1: as many lie above the value found as its share of the hours, and not one fewer. */
const hoursAbove: CheckRunner = (cases) => {
  const downwards = Int32Array.from({ length: SLOTS }, (_none, index) => SLOTS - index);
  const values = cases.map((each) => valueAtPercent(downwards, numberOf(each, 'percent')));
  const fall = values.every((value, index) => index === 0 || value < (values[index - 1] ?? 0));
  return cases.map((each, index) => {
    const most = numberOf(each, 'mostHoursAbove');
    const above = downwards.filter((value) => value > (values[index] ?? 0)).length;
    return {
      input: `${numberOf(each, 'percent')} % of the hours 1 to ${SLOTS}`,
      expected: `at most ${most} hours above, values falling with the share`,
      tolerance: 'exact',
      found: `${above} hours above ${values[index]}`,
      holds: fall && above <= most && above + 1 > most,
      tag: textOf(each, 'tag'),
    };
  });
};

function classesAddUp(each: PublishedCase): readonly CheckAnswer[] {
  const slots = numberOf(each, 'slots');
  const air = { dryBulbC: 30, humidityRatio: 0.01, pressurePa: 101_325 };
  const year = steadyYear(air, { slots, isMissing: (slot) => slot >= 4000 && slot < 4050 });
  const brief = briefFromPreset(officeForChecks);
  const { classes } = judgeYear({ year, brief, zone: 'Etc/UTC', heightM: 0 }).ledger;
  const sum = Object.values(classes).reduce((total, hours) => total + hours, 0);
  const input = `a year of ${slots} hours of which 50 in a row are missing`;
  return [
    exactly({ input, expected: String(numberOf(each, 'expected')), found: String(sum), tag: textOf(each, 'tag') }),
  ];
}

function shiftAndStretch(each: PublishedCase): readonly CheckAnswer[] {
  const [tag, tolerance] = [textOf(each, 'tag'), numberOf(each, 'tolerance')];
  const [meanC, hourC] = [numberOf(each, 'meanC'), numberOf(each, 'hourC')];
  const month = { meanC, meanMaxC: numberOf(each, 'meanMaxC'), meanMinC: numberOf(each, 'meanMinC') };
  const change = { maxShiftK: numberOf(each, 'maxShiftK'), minShiftK: numberOf(each, 'minShiftK') };
  const stretch = stretchOf(month, change);
  const derive = (tempC: number) => shiftedAndStretchedC(tempC, { meanC, shiftK: numberOf(each, 'shiftK'), stretch });
  // Any hours whose mean is the month's.
  const hours = [-9, -4, -1, 2, 5, 7].map((away) => meanC + away);
  const riseK = hours.reduce((sum, hour) => sum + derive(hour) - hour, 0) / hours.length;
  const given = inputOf(each, ['stretch', 'hourC', 'derivedC', 'meanRiseK']);
  return [
    within({ input: `stretch: ${given}`, expected: numberOf(each, 'stretch'), found: stretch, tag }, tolerance),
    within(
      { input: `an hour of ${hourC} °C`, expected: numberOf(each, 'derivedC'), found: derive(hourC), tag, unit: '°C' },
      tolerance,
    ),
    within(
      { input: 'rise of the mean', expected: numberOf(each, 'meanRiseK'), found: riseK, tag, unit: 'K' },
      tolerance,
    ),
  ];
}

/** A state out of the packed columns of a year that was moved: what is stored is what is held. */
function otherHeight(each: PublishedCase): readonly CheckAnswer[] {
  const [fromM, toM] = [numberOf(each, 'fromElevationM'), numberOf(each, 'toElevationM')];
  const [dryBulbC, pressurePa] = [numberOf(each, 'dryBulbC'), numberOf(each, 'pressurePa')];
  const ratio = numberOf(each, 'humidityRatio');
  const tag = textOf(each, 'tag');
  const air = { dryBulbC, dewPointC: numberOf(each, 'dewPointC'), pressurePa, belowZero: 'water' } as const;
  const year = steadyYear({ dryBulbC, humidityRatio: ratio, pressurePa });
  const moved = adjustToHeight({ year, fromElevationM: fromM, toElevationM: toM });
  const input = `${dryBulbC} °C, dew point ${air.dewPointC} °C, ${pressurePa} Pa`;
  const at = (where: string, columns: WeatherYear, expected: PublishedCase): readonly CheckAnswer[] => {
    const unpacked = unpackYear(columns.packed);
    const t = unpacked.dryBulbC[0] ?? Number.NaN;
    const w = unpacked.humidityRatio[0] ?? Number.NaN;
    const p = unpacked.pressurePa[0] ?? Number.NaN;
    const parts = [
      { name: 'dryBulbC', words: 'dry bulb', found: t, unit: '°C', tolerance: numberOf(each, 'toleranceC') },
      {
        name: 'dewPointC',
        words: 'dew point',
        found: dewPointC(t, w, p),
        unit: '°C',
        tolerance: numberOf(each, 'toleranceC'),
      },
      {
        name: 'wetBulbC',
        words: 'wet bulb',
        found: wetBulbC(t, w, p),
        unit: '°C',
        tolerance: numberOf(each, 'toleranceC'),
      },
      { name: 'pressurePa', words: 'pressure', found: p, unit: 'Pa', tolerance: numberOf(each, 'tolerancePa') },
      {
        name: 'relativeHumidityPct',
        words: 'relative humidity',
        found: relativeHumidityPct(t, w, p),
        unit: '%',
        tolerance: numberOf(each, 'tolerancePct'),
      },
    ];
    return parts.map(({ name, words, found, unit, tolerance }) =>
      within(
        { input: `${words} at ${where}: ${input}`, expected: numberOf(expected, name), found, tag, unit },
        tolerance,
      ),
    );
  };
  const asked = { input: `humidity ratio of ${input}`, expected: ratio, found: humidityRatioFromDewPoint(air) };
  return [
    // As many digits as are printed.
    withinShare({ ...asked, tag, unit: 'kg/kg' }, 1e-5),
    ...at(`${fromM} m`, year, each),
    ...at(`${toM} m`, moved, groupOf(each, 'expected')),
  ];
}

export const yearChecks: Readonly<Record<string, CheckRunner>> = {
  D01: eachCase(extremes),
  D02: hoursAbove,
  D05: eachCase(classesAddUp),
  F01: eachCase(shiftAndStretch),
  F02: eachCase(otherHeight),
};
