import { describe, expect, test } from 'vitest';
import { defaultScore } from '#engine/brief/score-defaults.ts';
import { bandWord, type RawComponents, weightedScore } from '#engine/score/weighted-score.ts';

const raw: RawComponents = {
  served: 84.5,
  severity: 150,
  spell: 60,
  damp: 10,
  water: 2.75,
  electricity: 30,
  'worst-year': 84.5,
};
const kelvin = { indexPoints: false };

describe('the score', () => {
  test('is the weighted sum of components between fixed anchors, with its arithmetic', () => {
    const { parts, scoreExact } = weightedScore(defaultScore, raw, kelvin);
    expect(parts.map(({ normalised }) => normalised)).toEqual([50, 50, 75, 75, 50, 50, 50]);
    expect(parts.map(({ points }) => points)).toEqual([15, 5, 7.5, 7.5, 7.5, 7.5, 5]);
    expect(scoreExact).toBe(55);
  });

  test('stops at the anchors', () => {
    const beyond = { ...raw, served: 12, severity: -5, water: 9, electricity: 80 };
    const { parts } = weightedScore(defaultScore, beyond, kelvin);
    expect(parts.map(({ normalised }) => normalised)).toEqual([0, 100, 75, 75, 0, 100, 50]);
  });

  test('shares the weight of a component that does not apply over the others in proportion', () => {
    const { parts, scoreExact } = weightedScore(defaultScore, { ...raw, damp: null }, kelvin);
    expect(parts.find(({ component }) => component === 'damp')).toMatchObject({ raw: null, weight: 0, points: null });
    expect(parts.find(({ component }) => component === 'served')?.weight).toBeCloseTo(100 / 3, 12);
    expect(parts.reduce((sum, { weight }) => sum + weight, 0)).toBeCloseTo(100, 9);
    expect(scoreExact).toBeCloseTo((55 - 7.5) / 0.9, 9);
  });

  test('is not a number when nothing applies', () => {
    const none: RawComponents = {
      served: null,
      severity: null,
      spell: null,
      damp: null,
      water: null,
      electricity: null,
      'worst-year': null,
    };
    expect(weightedScore(defaultScore, none, kelvin)).toMatchObject({ scoreExact: null, geometricMean: null });
  });

  test('has a geometric mean over max(s, 1) beside it, which one bad component pulls down', () => {
    const even = weightedScore(defaultScore, { ...raw, spell: 120, damp: 20 }, kelvin);
    expect(even.geometricMean).toBeCloseTo(50, 9);
    const flawed = weightedScore(defaultScore, { ...raw, spell: 120, damp: 20, water: 99 }, kelvin);
    expect(flawed.scoreExact).toBeCloseTo(42.5, 9);
    // 50^0.85 x 1^0.15, by hand.
    expect(flawed.geometricMean).toBeCloseTo(50 ** 0.85, 9);
  });

  test('counts severity in index points where the limit is an index', () => {
    const { parts } = weightedScore(defaultScore, raw, { indexPoints: true });
    expect(parts.find(({ component }) => component === 'severity')?.unit).toBe('point h per 1000 demand hours');
  });

  test('has bands in words from 80, 60 and 40 on', () => {
    expect([100, 80, 79, 60, 59, 40, 39, 0].map(bandWord)).toEqual([
      'most',
      'most',
      'much',
      'much',
      'some',
      'some',
      'little',
      'little',
    ]);
  });
});
