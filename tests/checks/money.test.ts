import { describe, expect, test } from 'vitest';
import { heldCheck } from '../support/held-check.ts';

describe('money and the reference plant', () => {
  test('N01 the COP by the Carnot form falls with the outdoor temperature and is capped', () => {
    expect(heldCheck('N01')).toHaveLength(7);
  });

  test('N02 simple payback is capital over saving, never without a saving, at once without extra capital', () => {
    expect(heldCheck('N02')).toHaveLength(5);
  });
});
