import { describe, expect, it } from 'vitest';
import { monthHours } from '../../../src/charts/month-hours.ts';

describe('hours by month and hour of day', () => {
  it('counts every wanted hour once, in its month and hour, in a leap year too', () => {
    for (const days of [365, 366]) {
      const codes = new Uint8Array(days * 24);
      codes[0] = 1;
      codes[31 * 24 - 1] = 1;
      codes[(days - 1) * 24 + 12] = 1;
      codes[59 * 24 + 5] = 1; // 1 March, or 29 February.
      const counts = monthHours(codes, (code) => code === 1);
      expect(counts.flat().reduce((sum, count) => sum + count, 0)).toBe(4);
      expect([counts[0]?.[0], counts[0]?.[23], counts[11]?.[12], counts[days === 366 ? 1 : 2]?.[5]]).toEqual([
        1, 1, 1, 1,
      ]);
    }
  });

  it('refuses what is no whole year', () => {
    expect(() => monthHours(new Uint8Array(100), () => true)).toThrow(RangeError);
  });
});
