import { describe, expect, test } from 'vitest';
import { heldCheck } from '../support/held-check.ts';

/** Numbers, sources and tags stand in data/checks/indoor-limits.json. */
describe('limits of halls and animal houses against published values', () => {
  test('C03 every cap of a hall applies at once', () => {
    expect(heldCheck('C03')).toHaveLength(5);
  });

  test('C04 the temperature-humidity index has the form of NRC 1971', () => {
    expect(heldCheck('C04')).toHaveLength(4);
  });

  test('C05 the index of broilers counts the speed of the air; no brief limits it', () => {
    expect(heldCheck('C05')).toHaveLength(2);
  });
});
