import { describe, expect, test } from 'vitest';
import {
  draftOf,
  emptyDraft,
  filledDown,
  readClimateDraft,
  shownFields,
  withStretch,
  withValue,
} from '../../../src/features/weather/climate-draft.ts';
import { problemWords, serverFaultWords, tableFaultWords } from '../../../src/features/weather/climate-words.ts';

const januaryAs = (value: string) => withValue(emptyDraft, { month: 0, field: 'shiftK', value });

describe('a change of climate as it is typed', () => {
  test('begins with nothing changed, which is no change to save', () => {
    expect(readClimateDraft(emptyDraft)).toMatchObject({ ok: true, changes: false });
    expect(shownFields(emptyDraft)).toEqual(['shiftK']);
  });

  test('takes decimal points and commas, a true minus sign, and January for all', () => {
    for (const [typed, value] of [
      ['1.5', 1.5],
      ['1,5', 1.5],
      ['−0,5', -0.5],
      ['+2', 2],
      [' 3. ', 3],
    ] as const) {
      const reading = readClimateDraft(filledDown(januaryAs(typed), 'shiftK'));
      expect(reading).toMatchObject({ ok: true, changes: true });
      if (reading.ok) expect(new Set(reading.monthly.map(({ shiftK }) => shiftK))).toEqual(new Set([value]));
    }
  });

  test('without stretch lets highest and lowest rise as the mean does, whatever stood in their fields', () => {
    const stretched = withValue(withStretch(januaryAs('2'), true), { month: 0, field: 'maxShiftK', value: '3' });
    const [apart] = monthlyOf(stretched);
    expect(apart).toEqual({ shiftK: 2, maxShiftK: 3, minShiftK: 2, ratioChangePct: 0 });
    expect(monthlyOf({ ...stretched, stretched: false })[0]).toMatchObject({ maxShiftK: 2, minShiftK: 2 });
  });

  test('counts the change of humidity under its rule alone, faults included', () => {
    const damp = withValue(emptyDraft, { month: 6, field: 'ratioChangePct', value: 'much' });
    expect(readClimateDraft(damp).ok).toBe(true);
    const scaled = readClimateDraft({ ...damp, humidityRule: 'ratio-scaled' });
    expect(scaled).toMatchObject({ ok: false, problems: [{ month: 6, field: 'ratioChangePct' }] });
  });

  test('tells every fault at once, in words that name month and field', () => {
    const draft = withValue(withValue(januaryAs('warm'), { month: 3, field: 'shiftK', value: '21' }), {
      month: 5,
      field: 'shiftK',
      value: '',
    });
    const reading = readClimateDraft(draft);
    expect(reading.ok ? [] : reading.problems.map(problemWords)).toEqual([
      'Jan, mean dry bulb: Give a number; 0 changes nothing.',
      'Apr, mean dry bulb: 21 K lies outside -20 to 20 K.',
      'Jun, mean dry bulb: Give a number; 0 changes nothing.',
    ]);
  });

  test('comes back from a table as it was read, with the rule that the table needs', () => {
    const monthly = Array.from({ length: 12 }, (_none, month) => ({
      shiftK: 1 + month / 10,
      maxShiftK: 2,
      minShiftK: 1,
      ratioChangePct: 5,
    }));
    const draft = draftOf(monthly, { hasRatioChange: true, humidityRule: 'rh-kept' });
    expect(draft).toMatchObject({ humidityRule: 'ratio-scaled', stretched: true });
    expect(monthlyOf(draft)).toEqual(monthly);
    expect(draftOf(monthly, { hasRatioChange: false, humidityRule: 'rh-kept' }).humidityRule).toBe('rh-kept');
  });
});

describe('a fault that was found elsewhere', () => {
  test('says where it is', () => {
    expect(tableFaultWords({ line: 4, column: 2, message: '“warm” is no number.' })).toBe(
      'Line 4, column 2: “warm” is no number.',
    );
    expect(tableFaultWords({ line: 4, column: null, message: 'No.' })).toBe('Line 4: No.');
    expect(tableFaultWords({ line: null, column: null, message: 'No.' })).toBe('No.');
    expect(serverFaultWords({ path: 'body.monthly.3', message: 'turned over.' })).toBe('Apr: turned over.');
    expect(serverFaultWords({ path: 'body.monthly', message: 'Give twelve.' })).toBe('Give twelve.');
  });
});

function monthlyOf(draft: Parameters<typeof readClimateDraft>[0]) {
  const reading = readClimateDraft(draft);
  if (!reading.ok) throw new Error(reading.problems.map(problemWords).join('; '));
  return reading.monthly;
}
