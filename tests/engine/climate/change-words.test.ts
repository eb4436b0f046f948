import { describe, expect, test } from 'vitest';
import { changeWords } from '#engine/climate/change-words.ts';
import type { MonthlyChange } from '#engine/climate/monthly-change.ts';

const months = (of: (month: number) => Partial<MonthlyChange>): MonthlyChange[] =>
  Array.from({ length: 12 }, (_none, month) => ({
    ...{ shiftK: 0, maxShiftK: 0, minShiftK: 0, ratioChangePct: 0 },
    ...of(month),
  }));

describe('a change of climate in a phrase', () => {
  test('says one value for every month, or the span and the mean', () => {
    const even = months(() => ({ shiftK: 2, maxShiftK: 2, minShiftK: 2 }));
    expect(changeWords(even, 'ratio-kept')).toBe(
      'dry bulb +2.0 K in every month, days not stretched, humidity ratio kept',
    );
    const uneven = months((month) => ({ shiftK: month - 1, maxShiftK: month, minShiftK: month - 1 }));
    expect(changeWords(uneven, 'rh-kept')).toBe(
      'dry bulb −1.0 to +10.0 K by month, +4.5 K on average, daily swing +1.0 K in every month, relative humidity kept',
    );
  });

  test('names the change of humidity under its rule alone', () => {
    const damper = months((month) => ({ ratioChangePct: month < 6 ? 5 : -0.04 }));
    expect(changeWords(damper, 'ratio-scaled')).toBe(
      'dry bulb 0.0 K in every month, days not stretched, humidity ratio scaled by 0.0 to +5.0 % by month, +2.5 % on average',
    );
    expect(changeWords(damper, 'ratio-kept')).not.toContain('%');
  });
});
