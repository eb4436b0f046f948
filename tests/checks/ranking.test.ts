import { describe, expect, test } from 'vitest';
import * as z from 'zod/mini';
import { rankPlaces } from '#engine/ranking/rank-places.ts';
import { heldCheck } from '../support/held-check.ts';
import { casesOf } from '../support/published-values.ts';

const numbers = z.array(z.number());
/** The engine's criteria run to 100. */
const placeOf = (id: string, criteria: readonly number[]) => ({
  id,
  criteria: criteria.map((value) => 100 * value),
  years: [],
  doubts: [],
});

describe('ranking against defined values', () => {
  test('S01 three alternatives share the weights as the areas of the weight line say', () => {
    expect(heldCheck('S01')).toHaveLength(18);
    const cases = casesOf('S01', {
      alternative: z.string(),
      criteria: numbers,
      rankShares: numbers,
      centralWeight1: z.number(),
      draws: z.number(),
      tolerance: z.number(),
      sumTolerance: z.number(),
    });
    const places = cases.map(({ alternative, criteria }) => placeOf(alternative, criteria));
    const draws = cases[0]?.draws ?? 0;
    const sumTolerance = cases[0]?.sumTolerance ?? 0;
    for (const seed of [1, 2, 3]) {
      const ranking = rankPlaces({ places, weights: [1, 1], view: 'any weights', seed, draws });
      for (const { alternative, rankShares, centralWeight1, tolerance } of cases) {
        const found = ranking.places.find(({ id }) => id === alternative);
        for (const [rank, share] of rankShares.entries()) {
          const answer = found?.rankShares[rank] ?? Number.NaN;
          expect(Math.abs(answer - share), `${alternative} rank ${rank + 1}: ${answer}`).toBeLessThanOrEqual(tolerance);
        }
        const central = found?.centralWeights?.[0] ?? Number.NaN;
        expect(Math.abs(central - centralWeight1), `${alternative} ${central}`).toBeLessThanOrEqual(tolerance);
        const row = found?.rankShares.reduce((sum, share) => sum + share, 0) ?? Number.NaN;
        expect(Math.abs(row - 1)).toBeLessThanOrEqual(sumTolerance);
      }
      for (const rank of [0, 1, 2]) {
        const column = ranking.places.reduce((sum, { rankShares }) => sum + (rankShares[rank] ?? 0), 0);
        expect(Math.abs(column - 1)).toBeLessThanOrEqual(sumTolerance);
      }
    }
    expect(cases).toHaveLength(3);
  });

  test('S02 scaled weights rank the same, and the first two swap where they tie', () => {
    expect(heldCheck('S02')).toHaveLength(7);
    const cases = casesOf('S02', {
      ahead: numbers,
      behind: numbers,
      weights: numbers,
      scaledBy: numbers,
      swapWeight1: z.number(),
    });
    for (const { ahead, behind, weights, scaledBy, swapWeight1 } of cases) {
      const places = [placeOf('ahead', ahead), placeOf('behind', behind)];
      const rank = (scaled: readonly number[]) =>
        rankPlaces({ places, weights: scaled, view: 'near the brief', seed: 7, draws: 1000 });
      const ranking = rank(weights);
      expect(ranking.places.map(({ id }) => id)).toEqual(['ahead', 'behind']);
      expect(ranking.neighbours[0]?.swap?.criterion).toBe(0);
      expect(ranking.neighbours[0]?.swap?.toWeight).toBeCloseTo(100 * swapWeight1, 10);
      for (const factor of scaledBy) {
        const scaled = rank(weights.map((weight) => weight * factor));
        expect(scaled.places.map(({ id }) => id)).toEqual(['ahead', 'behind']);
        expect(scaled.places.map(({ rankShares }) => rankShares)).toEqual(
          ranking.places.map(({ rankShares }) => rankShares),
        );
      }
      const atSwap = rank([swapWeight1, 1 - swapWeight1]);
      expect(atSwap.places.map(({ rank: place, tied }) => ({ place, tied }))).toEqual([
        { place: 1, tied: true },
        { place: 1, tied: true },
      ]);
    }
    expect(cases).toHaveLength(1);
  });
});
