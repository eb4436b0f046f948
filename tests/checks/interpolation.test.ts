import { describe, expect, test } from 'vitest';
import { heldCheck } from '../support/held-check.ts';

describe('interpolation and distance against computed values', () => {
  test('I01 inverse distance along a line, each value estimated from the others, and at a station', () => {
    expect(heldCheck('I01')).toHaveLength(9);
  });

  test('I02 one degree of latitude, and Phoenix to Las Vegas', () => {
    expect(heldCheck('I02')).toHaveLength(4);
  });
});
