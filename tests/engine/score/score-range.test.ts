import { describe, expect, test } from 'vitest';
import { judgeYear } from '#engine/run/judge-year.ts';
import { scoreRange } from '#engine/score/score-range.ts';
import { presetBrief } from '../../support/presets.ts';
import { syntheticYear } from '../../support/synthetic-year.ts';

/** A year on the edge of what the office brief bears: afternoons at 36 °C, humidity that swings over days. */
const year = syntheticYear({
  at: (slot) => ({
    dryBulbC: 27 + 9 * Math.sin((2 * Math.PI * ((slot % 24) - 9)) / 24),
    humidityRatio: 0.011 + 0.003 * Math.sin((2 * Math.PI * slot) / (24 * 9)),
  }),
});
const place = { year, zone: 'UTC', heightM: 0 };
const office = presetBrief('office');

describe('the range of a score', () => {
  test('has a pair for each doubt, the score between its ends, and names the largest', () => {
    const { pairs, largest } = scoreRange({ ...place, brief: office, humidityFrom: 'dew point' });
    const score = judgeYear({ ...place, brief: office }).scoreExact ?? Number.NaN;
    expect(pairs.map(({ doubt }) => doubt)).toEqual([
      'humidity reading',
      'plant tolerance',
      'set-point',
      'humidity cap',
    ]);
    for (const { minus, plus } of pairs) {
      const ends = [minus.scoreExact ?? Number.NaN, plus.scoreExact ?? Number.NaN];
      expect(Math.min(...ends)).toBeLessThanOrEqual(score);
      expect(Math.max(...ends)).toBeGreaterThanOrEqual(score);
    }
    const spreads = pairs.map(({ minus, plus }) => Math.abs((plus.scoreExact ?? 0) - (minus.scoreExact ?? 0)));
    expect(largest).toBe(pairs[spreads.indexOf(Math.max(...spreads))]?.doubt);
    expect(Math.max(...spreads)).toBeGreaterThan(1);
  });

  test('reads damper air as worse and a warmer set-point as better', () => {
    for (const humidityFrom of ['dew point', 'relative humidity'] as const) {
      const [humidity, , setPoint] = scoreRange({ ...place, brief: office, humidityFrom }).pairs;
      expect(humidity?.plus.scoreExact).toBeLessThan(humidity?.minus.scoreExact ?? 0);
      expect(setPoint?.plus.scoreExact).toBeGreaterThan(setPoint?.minus.scoreExact ?? 100);
      expect(humidity?.plus.label).toBe(humidityFrom === 'dew point' ? '+0.5 K dew point' : '+3 points humidity');
    }
  });

  test('has no pair for what the brief does not have', () => {
    const { pairs } = scoreRange({
      ...place,
      brief: presetBrief('office', { stages: [], caps: {} }),
      humidityFrom: 'dew point',
    });
    expect(pairs.map(({ doubt }) => doubt)).toEqual(['humidity reading', 'set-point']);
  });

  test('moves what a limit holds by 1 K, whatever it is called, and leaves indices and adaptive limits alone', () => {
    const doubtsOf = (preset: string) => {
      const brief = presetBrief(preset, { months: [7] });
      const { pairs } = scoreRange({ ...place, brief, humidityFrom: 'dew point' });
      return { brief, pairs };
    };
    for (const preset of ['hall-recommended', 'process-water', 'turbine-inlet']) {
      const { brief, pairs } = doubtsOf(preset);
      const setPoint = pairs.find(({ doubt }) => doubt === 'set-point');
      for (const [end, moveK] of [
        [setPoint?.minus, -1],
        [setPoint?.plus, 1],
      ] as const) {
        const { limit } = brief;
        const moved =
          limit.kind === 'inlet'
            ? { ...limit, tempC: limit.tempC + moveK }
            : limit.kind === 'tower'
              ? { ...limit, coldC: limit.coldC + moveK }
              : limit.kind === 'turbine'
                ? { ...limit, targetC: limit.targetC + moveK }
                : limit;
        expect(moved).not.toEqual(limit);
        expect(end?.scoreExact).toBe(judgeYear({ ...place, brief: { ...brief, limit: moved } }).scoreExact);
      }
    }
    for (const preset of ['dairy', 'warehouse', 'school']) {
      expect(doubtsOf(preset).pairs.map(({ doubt }) => doubt)).not.toContain('set-point');
    }
  });

  test('says at each end what the score is made of, beside the year as it stands', () => {
    const range = scoreRange({ ...place, brief: office, humidityFrom: 'relative humidity' });
    const { parts } = judgeYear({ ...place, brief: office });
    expect(range.normalised).toEqual(parts.map(({ normalised }) => normalised));
    const total = office.score.reduce((sum, { weight }) => sum + weight, 0);
    for (const { scoreExact, normalised } of range.pairs.flatMap(({ minus, plus }) => [minus, plus])) {
      const sum = office.score.reduce(
        (all, { weight }, at) => all + (weight / total) * (normalised[at] ?? Number.NaN),
        0,
      );
      expect(sum).toBeCloseTo(scoreExact ?? Number.NaN, 9);
    }
  });
});
