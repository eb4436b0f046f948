import { describe, expect, test } from 'vitest';
import { waterCycles } from '#engine/sites/water-cycles.ts';

const unknown = { hardness: null, alkalinity: null, silica: null, 'dissolved solids': null };

describe('cycles of concentration', () => {
  test('are the least of limit over make-up, by the ion that limits', () => {
    const answer = waterCycles({ hardness: 200, alkalinity: 150, silica: 60, 'dissolved solids': 300 });
    expect(answer.cycles).toBeCloseTo(2.5, 9);
    expect(answer).toMatchObject({ limiting: 'hardness', unknown: [] });
    // Make-up over evaporation at C = 2.5 is C/(C - 1) = 1.667, of which 1 evaporates.
    expect(answer.bleedShare).toBeCloseTo(0.6667, 4);
  });

  test('are five at most, however soft the water', () => {
    const soft = waterCycles({ ...unknown, hardness: 20 });
    expect(soft).toMatchObject({ cycles: 5, limiting: null, bleedShare: 0.25 });
    expect(soft.unknown).toEqual(['alkalinity', 'silica', 'dissolved solids']);
  });

  test('do not exist for water that is over a limit as it comes, nor for water of which nothing is known', () => {
    expect(waterCycles({ ...unknown, silica: 160 })).toMatchObject({ cycles: null, limiting: 'silica' });
    expect(waterCycles(unknown)).toMatchObject({ cycles: null, limiting: null, allowed: [] });
    expect(waterCycles({ ...unknown, silica: 0 })).toMatchObject({ cycles: 5 });
  });
});
