import { describe, expect, test } from 'vitest';
import { type GradeInput, gradePlace } from '#engine/score/grade-place.ts';

const best: GradeInput = {
  distanceKm: 0,
  heightDifferenceM: 0,
  years: { actual: 10, typical: false },
  measuredSharePct: 99,
  flagsInformative: true,
  kind: 'station',
};

function letter(change: Partial<GradeInput>): string {
  return gradePlace({ ...best, ...change }).grade;
}

describe('the grade', () => {
  test('is the worst column, each with its reason', () => {
    const { grade, columns } = gradePlace({ ...best, heightDifferenceM: -140, years: { actual: 0, typical: true } });
    expect(grade).toBe('C');
    expect(columns.map((column) => [column.column, column.grade])).toEqual([
      ['distance', 'A'],
      ['height difference', 'B'],
      ['years', 'C'],
      ['measured share', 'A'],
      ['kind', 'A'],
    ]);
    expect(columns.every(({ reason }) => reason.length > 5)).toBe(true);
  });

  test('falls with distance: 25, 50, 100 km and beyond, each limit included', () => {
    expect([0, 25, 25.1, 50, 50.1, 100, 100.1].map((distanceKm) => letter({ distanceKm })).join('')).toBe('AABBCCD');
  });

  test('falls with height difference of either sign: 100, 150, 300 m and beyond', () => {
    expect([100, -101, 150, -151, 300, 301].map((metres) => letter({ heightDifferenceM: metres })).join('')).toBe(
      'ABBCCD',
    );
    expect(letter({ heightFromRelief: true })).toBe('C');
    expect(letter({ heightFromRelief: true, heightDifferenceM: 400 })).toBe('D');
  });

  test.each([
    [10, false, 'A'],
    [9, false, 'B'],
    [5, false, 'B'],
    [4, false, 'C'],
    [3, false, 'C'],
    [2, false, 'D'],
    [0, true, 'C'],
    [2, true, 'C'],
    [3, true, 'B'],
    [0, false, 'D'],
  ])('of %i actual years, typical year %s, is %s', (actual, typical, expected) => {
    expect(letter({ years: { actual, typical } })).toBe(expected);
  });

  test('falls with the measured share: 98, 95, 90 % and below; B at best when flags say nothing', () => {
    expect([98, 97.9, 95, 94.9, 90, 89.9].map((share) => letter({ measuredSharePct: share })).join('')).toBe('ABBCCD');
    expect(letter({ flagsInformative: false })).toBe('B');
    expect(letter({ flagsInformative: false, measuredSharePct: 91 })).toBe('C');
    expect(letter({ measuredSharePct: null, flagsInformative: false })).toBe('B');
  });

  test('is C at best for reanalysis and derived years and D for an estimate between stations', () => {
    const kinds = ['station', 'reanalysis', 'derived', 'estimate'] as const;
    expect(kinds.map((kind) => letter({ kind })).join('')).toBe('ACCD');
  });
});
