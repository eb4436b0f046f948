import { describe, expect, test } from 'vitest';
import { heldCheck } from '../support/held-check.ts';

describe('distance against computed values', () => {
  test('I02 one degree of latitude, and Phoenix to Las Vegas', () => {
    expect(heldCheck('I02')).toHaveLength(4);
  });
});
