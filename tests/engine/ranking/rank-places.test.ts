import * as fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { PlaceToRank } from '#engine/ranking/place-to-rank.ts';
import { rankPlaces, shareInTop } from '#engine/ranking/rank-places.ts';
import { seededRandom } from '#engine/ranking/seeded-random.ts';
import { weightDraws } from '#engine/ranking/weight-draws.ts';
import { propertySettings } from '../../support/sample-size.ts';

const WEIGHTS = [30, 10, 10, 15, 15];
const DRAWS = 300;

const value = fc.integer({ min: 0, max: 100 });
const criteria = fc.array(value, { minLength: WEIGHTS.length, maxLength: WEIGHTS.length });
const change = fc.array(fc.integer({ min: -30, max: 30 }), { minLength: WEIGHTS.length, maxLength: WEIGHTS.length });
const doubts = fc.array(
  fc.record({
    doubt: fc.constantFrom('humidity reading' as const, 'plant tolerance' as const, 'set-point' as const),
    minus: change,
    plus: change,
  }),
  { maxLength: 2 },
);
const portfolio = fc
  .array(fc.record({ criteria, years: fc.array(criteria, { maxLength: 3 }), doubts }), { minLength: 1, maxLength: 9 })
  .map((places): PlaceToRank[] => places.map((place, at) => ({ id: `place ${at}`, ...place })));
const views = fc.constantFrom('near the brief' as const, 'any weights' as const);

function plain(id: string, ...values: (number | null)[]): PlaceToRank {
  return { id, criteria: values, years: [], doubts: [] };
}

describe('a ranking', () => {
  test('gives every place every rank in shares that sum to 1, by rows and by columns', () => {
    fc.assert(
      fc.property(portfolio, views, fc.integer(), (places, view, seed) => {
        const ranking = rankPlaces({ places, weights: WEIGHTS, view, seed, draws: DRAWS });
        for (const { rankShares } of ranking.places) {
          expect(Math.abs(rankShares.reduce((sum, share) => sum + share, 0) - 1)).toBeLessThan(1e-9);
        }
        for (const rank of places.keys()) {
          const column = ranking.places.reduce((sum, { rankShares }) => sum + (rankShares[rank] ?? 0), 0);
          expect(Math.abs(column - 1)).toBeLessThan(1e-9);
        }
        expect(rankPlaces({ places, weights: WEIGHTS, view, seed, draws: DRAWS })).toEqual(ranking);
      }),
      propertySettings(60),
    );
  });

  test('is not changed by weights on another scale', () => {
    fc.assert(
      fc.property(portfolio, fc.double({ min: 1e-3, max: 1e6, noNaN: true }), (places, factor) => {
        const rank = (weights: readonly number[]) =>
          rankPlaces({ places, weights, view: 'near the brief', seed: 3, draws: DRAWS }).places;
        const scaled = rank(WEIGHTS.map((weight) => weight * factor));
        expect(scaled.map(({ id, rank: place, rankShares }) => ({ id, place, rankShares }))).toEqual(
          rank(WEIGHTS).map(({ id, rank: place, rankShares }) => ({ id, place, rankShares })),
        );
      }),
      propertySettings(60),
    );
  });

  test('lets equal scores right between two hundredths share a rank, whatever the scale of the weights', () => {
    // Both come to 1190 / 80 = 14.875.
    const places = [plain('one', 2, 65, 0, 1, 31), plain('other', 3, 95, 6, 3, 3)];
    for (const factor of [1, 22099.608652149447, 0.0123]) {
      const weights = WEIGHTS.map((weight) => weight * factor);
      const ranked = rankPlaces({ places, weights, view: 'near the brief', seed: 3, draws: DRAWS }).places;
      expect(ranked.map(({ id, rank, tied }) => ({ id, rank, tied }))).toEqual([
        { id: 'one', rank: 1, tied: true },
        { id: 'other', rank: 1, tied: true },
      ]);
    }
  });

  test('keeps the order and the odds of the others when a place joins that every one of them dominates', () => {
    fc.assert(
      fc.property(portfolio, views, (places, view) => {
        const before = rankPlaces({ places, weights: WEIGHTS, view, seed: 11, draws: DRAWS });
        const joined = [...places, plain('dominated', ...WEIGHTS.map(() => -1))];
        const after = rankPlaces({ places: joined, weights: WEIGHTS, view, seed: 11, draws: DRAWS });
        expect(after.places.at(-1)).toMatchObject({ id: 'dominated', rank: places.length + 1 });
        expect(after.places.slice(0, -1).map(({ id, rank }) => ({ id, rank }))).toEqual(
          before.places.map(({ id, rank }) => ({ id, rank })),
        );
        expect(after.neighbours.slice(0, -1)).toEqual(before.neighbours);
        expect(after.places.slice(0, -1).map(({ rankShares }) => rankShares.slice(0, -1))).toEqual(
          before.places.map(({ rankShares }) => rankShares),
        );
      }),
      propertySettings(60),
    );
  });

  test('counts exactly what a plain sort of objects counts, draw by draw', () => {
    const random = seededRandom(6);
    const values = () => WEIGHTS.map(() => Math.floor(100 * random()));
    const places = Array.from({ length: 40 }, (_none, at) => plain(`place ${at}`, ...values()));
    const draws = 500;
    for (const view of ['near the brief', 'any weights'] as const) {
      const ranking = rankPlaces({ places, weights: WEIGHTS, view, seed: 9, draws });
      const shares = WEIGHTS.map((weight) => weight / 80);
      const next = weightDraws({ view, weights: shares, random: seededRandom(9, 'weights') });
      const drawn = new Float64Array(WEIGHTS.length);
      const counts = new Map(places.map(({ id }) => [id, places.map(() => 0)]));
      for (let draw = 0; draw < draws; draw++) {
        next(drawn);
        const scored = places.map(({ id, criteria: own }) => ({
          id,
          score: own.reduce<number>((sum, each, at) => sum + (each ?? 0) * (drawn[at] ?? 0), 0),
        }));
        scored.sort((one, other) => other.score - one.score);
        for (const [rank, { id }] of scored.entries()) {
          const row = counts.get(id);
          if (row !== undefined) row[rank] = (row[rank] ?? 0) + 1;
        }
      }
      const found = new Map(ranking.places.map(({ id, rankShares }) => [id, rankShares.map((share) => share * draws)]));
      for (const [id, row] of counts) expect(found.get(id)?.map(Math.round)).toEqual(row);
    }
  });

  test('gives places that are the same in everything equal parts of the ranks that they fill', () => {
    const places = [plain('a', 80, 20), plain('b', 50, 50), plain('c', 20, 80), plain('d', 50, 50)];
    const { places: ranked } = rankPlaces({ places, weights: [1, 1], view: 'any weights', seed: 4 });
    const twins = ranked.filter(({ id }) => id === 'b' || id === 'd');
    expect(twins.map(({ rankShares }) => rankShares)).toEqual([
      [0, 0.5, 0.5, 0],
      [0, 0.5, 0.5, 0],
    ]);
  });

  test('says P(top k), and ties where two cannot be told apart', () => {
    const places = [plain('steady', 70, 70), plain('twin', 70, 70), plain('far', 10, 10)];
    const ranking = rankPlaces({ places, weights: [1, 1], view: 'near the brief', seed: 1, draws: 1000 });
    expect(ranking.places.map(({ rank, tied }) => [rank, tied])).toEqual([
      [1, true],
      [1, true],
      [3, false],
    ]);
    expect(ranking.places.map((place) => shareInTop(place, 2))).toEqual([1, 1, 0]);
    expect(ranking.neighbours.map(({ aheadShare, tie }) => [aheadShare, tie])).toEqual([
      [0.5, true],
      [1, false],
    ]);
    expect(ranking.places.at(-1)?.centralWeights).toBeNull();
  });

  test('shares the weight of a criterion that does not apply over the others', () => {
    const places = [plain('without', 60, null, 40), plain('with', 60, 45, 40)];
    const { places: ranked, neighbours } = rankPlaces({
      places,
      weights: [2, 6, 2],
      view: 'near the brief',
      seed: 1,
      draws: 100,
    });
    expect(ranked.map(({ id, scoreExact }) => [id, scoreExact])).toEqual([
      ['without', 50],
      ['with', expect.closeTo(47, 10)],
    ]);
    const swap = neighbours[0]?.swap;
    if (swap == null) throw new Error('they tie somewhere');
    // At the weights named the two sums are the same, the second criterion left out of the first.
    const moved = [2, 6, 2].map((weight, at) =>
      at === swap.criterion
        ? swap.toWeight
        : (weight * (100 - swap.toWeight)) / (10 - ([2, 6, 2][swap.criterion] ?? 0)),
    );
    const [w0 = 0, w1 = 0, w2 = 0] = moved;
    expect((60 * w0 + 40 * w2) / (w0 + w2)).toBeCloseTo((60 * w0 + 45 * w1 + 40 * w2) / 100, 9);
  });

  test('draws only states that were judged, the same end of a shared doubt for every place', () => {
    const shared = (id: string, base: number, by: number): PlaceToRank => ({
      id,
      criteria: [base],
      years: [],
      doubts: [{ doubt: 'plant tolerance', minus: [-by], plus: [by] }],
    });
    // Whatever the plant is, it is the same at both: the better one stays ahead though their ranges overlap.
    const together = rankPlaces({
      places: [shared('better', 52, 10), shared('worse', 50, 10)],
      weights: [1],
      view: 'near the brief',
      seed: 8,
    });
    expect(together.neighbours[0]?.aheadShare).toBe(1);
    // The reading of humidity is each station's own: of nine equally likely pairs of ends, six leave the better ahead.
    const own = (place: PlaceToRank): PlaceToRank => ({
      ...place,
      doubts: place.doubts.map((each) => ({ ...each, doubt: 'humidity reading' as const })),
    });
    const apart = rankPlaces({
      places: [own(shared('better', 52, 10)), own(shared('worse', 50, 10))],
      weights: [1],
      view: 'near the brief',
      seed: 8,
    });
    // 1.96 sqrt(2/9 / 10,000) = 0.0093; three times as wide once in 10^8 seeds, and the seed is fixed
    expect(Math.abs((apart.neighbours[0]?.aheadShare ?? 0) - 6 / 9)).toBeLessThan(0.015);
    // Of two years, one in which the place fails: first in half of the draws.
    const years = rankPlaces({
      places: [{ id: 'two years', criteria: [60], years: [[90], [30]], doubts: [] }, plain('one year', 50)],
      weights: [1],
      view: 'near the brief',
      seed: 8,
    });
    expect(Math.abs((years.places[0]?.rankShares[0] ?? 0) - 0.5)).toBeLessThan(0.015);
  });

  test('is refused on weights that are none, on repeated places and on a place without criteria', () => {
    const base = { view: 'near the brief' as const, seed: 1, draws: 10 };
    const one = plain('a', 1, null);
    expect(() => rankPlaces({ ...base, places: [one], weights: [0, 0] })).toThrow(RangeError);
    expect(() => rankPlaces({ ...base, places: [one], weights: [1, -1] })).toThrow('below 0, not all 0');
    expect(() => rankPlaces({ ...base, places: [one], weights: [Number.NaN, 1] })).toThrow(RangeError);
    expect(() => rankPlaces({ ...base, places: [one, one], weights: [1, 1] })).toThrow('ranked once');
    expect(() => rankPlaces({ ...base, places: [one], weights: [0, 1] })).toThrow('no criterion');
    expect(() => rankPlaces({ ...base, draws: 0, places: [one], weights: [1, 1] })).toThrow('needs draws');
    expect(rankPlaces({ ...base, places: [], weights: [1, 1] }).places).toEqual([]);
  });
});
