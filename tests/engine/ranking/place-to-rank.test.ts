import { describe, expect, test } from 'vitest';
import { placeToRank } from '#engine/ranking/place-to-rank.ts';
import { rankPlaces } from '#engine/ranking/rank-places.ts';
import { judgeYear } from '#engine/run/judge-year.ts';
import { placeFigures } from '#engine/score/place-figures.ts';
import { scoreRange } from '#engine/score/score-range.ts';
import { presetBrief } from '../../support/presets.ts';
import { climateHeightM, climates, climateYear } from '../../support/synthetic-climates.ts';

const brief = presetBrief('office');

describe('a place as it goes into a ranking', () => {
  test('carries its components, its years and what each doubt of its range does to them', () => {
    const [climate] = climates;
    if (climate === undefined) throw new Error('ten climates');
    const year = { ...climateYear(climate), kind: 'actual' as const, year: 2019 };
    const input = { year, brief, zone: climate.zone, heightM: climateHeightM(climate) };
    const result = judgeYear(input);
    const figures = placeFigures({ brief, runs: [{ kind: 'actual', year: 2019, result }] });
    const range = scoreRange({ ...input, humidityFrom: 'dew point' });
    const place = placeToRank({ id: 'desert', figures, range });
    expect(place.criteria).toEqual(figures.parts.map(({ normalised }) => normalised));
    expect(place.years).toEqual([result.parts.map(({ normalised }) => normalised)]);
    expect(place.doubts.map(({ doubt }) => doubt)).toEqual(range.pairs.map(({ doubt }) => doubt));
    const [first] = place.doubts;
    const end = range.pairs[0]?.minus.normalised ?? [];
    expect(end.length).toBe(place.criteria.length);
    for (const [at, value] of end.entries()) {
      expect((place.criteria[at] ?? 0) + (first?.minus[at] ?? 0)).toBeCloseTo(value ?? 0, 9);
    }
  });

  test('ranks by its score: the first view of ten climates is the order of their scores', () => {
    const judged = climates.slice(0, 4).map((climate) => {
      const input = { year: climateYear(climate), brief, zone: climate.zone, heightM: climateHeightM(climate) };
      const result = judgeYear(input);
      const figures = placeFigures({ brief, runs: [{ kind: 'typical', year: null, result }] });
      return {
        id: climate.name,
        scoreExact: figures.scoreExact ?? 0,
        place: placeToRank({ id: climate.name, figures, range: null }),
      };
    });
    const ranking = rankPlaces({
      places: judged.map(({ place }) => place),
      weights: brief.score.map(({ weight }) => weight),
      view: 'near the brief',
      seed: 2026,
      draws: 1000,
    });
    const byScore = judged.toSorted((one, other) => other.scoreExact - one.scoreExact);
    expect(ranking.places.map(({ id }) => id)).toEqual(byScore.map(({ id }) => id));
    for (const [at, { scoreExact }] of ranking.places.entries()) {
      expect(scoreExact).toBeCloseTo(byScore[at]?.scoreExact ?? Number.NaN, 9);
    }
  });
});
