import { describe, expect, test } from 'vitest';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { type PlaceRun, placeFigures } from '#engine/score/place-figures.ts';
import { presetBrief } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

const brief = presetBrief('office');

/** Dry all year but for damp hours on the first so many days. */
function runOf(kind: YearKind, year: number | null, input: { dampDays: number; missingDays?: number }): PlaceRun {
  const weather = syntheticYear({
    kind,
    year,
    at: (slot) => {
      const day = Math.floor(slot / 24);
      if (day >= 180 && day < 180 + (input.missingDays ?? 0)) return null;
      return day < input.dampDays ? { dryBulbC: 28, saturation: 1 } : { dryBulbC: 30, humidityRatio: 0.005 };
    },
  });
  return { kind, year, result: judgeYear({ year: weather, brief, zone: 'UTC', heightM: 0 }) };
}

const typical = runOf('typical', null, { dampDays: 14 });
const actual = [0, 7, 14, 28, 84].map((dampDays, index) => runOf('actual', 2015 + index, { dampDays }));

function served(run: { parts: PlaceRun['result']['parts'] }, component = 'served'): number {
  return run.parts.find((part) => part.component === component)?.raw ?? Number.NaN;
}

describe('the figures of a place', () => {
  test('rest on the typical year with fewer than 5 actual years', () => {
    const figures = placeFigures({ brief, runs: [...actual.slice(0, 4), typical] });
    expect(figures.basis).toBe('typical year');
    expect(figures.runs).toEqual([typical]);
    expect(figures.shown).toBe(typical);
    expect(figures.scoreExact).toBeCloseTo(typical.result.scoreExact ?? Number.NaN, 9);
  });

  test('rest on the latest actual year where there is no typical one', () => {
    const figures = placeFigures({ brief, runs: [...actual.slice(0, 4)].toReversed() });
    expect(figures.basis).toBe('latest actual year');
    expect(figures.runs.map(({ year }) => year)).toEqual([2018]);
    expect(served(figures, 'worst-year')).toBe(served(figures));
  });

  test('are medians over 5 actual years, with the least as the worst year', () => {
    const figures = placeFigures({ brief, runs: [typical, ...actual.toReversed()] });
    expect(figures.basis).toBe('median over actual years');
    expect(figures.runs.map(({ year }) => year)).toEqual([2015, 2016, 2017, 2018, 2019]);
    const all = actual.map(({ result }) => served(result));
    expect(served(figures)).toBe(all.toSorted((one, other) => one - other)[2]);
    expect(served(figures, 'worst-year')).toBe(Math.min(...all));
    const distances = actual.map(({ result }) => Math.abs((result.scoreExact ?? 0) - (figures.scoreExact ?? 0)));
    expect(figures.shown).toBe(actual[distances.indexOf(Math.min(...distances))]);
    expect(figures.yearsMeeting).toBe(actual.filter(({ result }) => result.verdict === 'meets the brief').length);
    expect(figures.verdict).toBe('does not');
    const scores = actual.map(({ result }) => result.score ?? Number.NaN);
    expect(figures.range).toEqual({ low: Math.min(...scores), high: Math.max(...scores) });
  });

  test('take the mean of the middle two of an even number of years', () => {
    const six = [...actual, runOf('actual', 2020, { dampDays: 56 })];
    const sorted = six.map(({ result }) => served(result)).toSorted((one, other) => one - other);
    expect(served(placeFigures({ brief, runs: six }))).toBeCloseTo(((sorted[2] ?? 0) + (sorted[3] ?? 0)) / 2, 12);
  });

  test('leave out derived years and years that are not usable, and say so when none is left', () => {
    const gappy = runOf('typical', null, { dampDays: 0, missingDays: 5 });
    const derived = runOf('derived', null, { dampDays: 0 });
    const figures = placeFigures({ brief, runs: [gappy, derived] });
    expect(figures).toMatchObject({
      basis: 'no usable year',
      shown: null,
      score: null,
      verdict: null,
      scoreNote: 'not applicable: no usable weather year: less than 90 % of the hours of July',
    });
    expect(placeFigures({ brief, runs: [] }).scoreNote).toBe('not applicable: no usable weather year');
  });

  test('are excluded by a gate that fails in one of their years, which is named', () => {
    const failing = actual.map((run) =>
      run.year === 2018
        ? { ...run, result: { ...run.result, gates: [{ gate: 'x', answer: 'fail' as const, note: '3 h over 28 °C' }] } }
        : run,
    );
    const figures = placeFigures({ brief, runs: failing });
    expect(figures).toMatchObject({ score: null, words: null, scoreNote: 'excluded: 2018: 3 h over 28 °C' });
  });
});
