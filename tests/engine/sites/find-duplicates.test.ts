import { describe, expect, test } from 'vitest';
import { findDuplicates } from '#engine/sites/find-duplicates.ts';

/** Ten metres of latitude: 10 / 111,195 of a degree on a sphere of 6371.0088 km. */
const TEN_M = 10 / 111_195;

describe('duplicates', () => {
  const place = { name: 'Harbour school', latitude: 60, longitude: 20 };

  test('are those of the same name, whatever its case and spaces', () => {
    const other = { name: ' harbour  SCHOOL ', latitude: 61, longitude: 20 };
    expect(findDuplicates([place, other])).toEqual([{ index: 1, by: 'name', of: { kind: 'row', index: 0 } }]);
  });

  test('are those within ten metres, north or east, also across the edge of a cell', () => {
    const near = [
      { name: 'north', latitude: 60 + 0.99 * TEN_M, longitude: 20 },
      { name: 'east', latitude: 60, longitude: 20 + (0.99 * TEN_M) / Math.cos(Math.PI / 3) },
      { name: 'south', latitude: 60 - 0.99 * TEN_M, longitude: 20 },
    ];
    expect(findDuplicates([place, ...near]).map(({ index, by }) => [index, by])).toEqual([
      [1, 'place'],
      [2, 'place'],
      [3, 'place'],
    ]);
    const apart = [
      { name: 'north', latitude: 60 + 1.01 * TEN_M, longitude: 20 },
      { name: 'east', latitude: 60, longitude: 20 + (1.01 * TEN_M) / Math.cos(Math.PI / 3) },
    ];
    expect(findDuplicates([place, ...apart])).toEqual([]);
  });

  test('are also those of what was there before, which is not looked at itself', () => {
    expect(findDuplicates([{ ...place, name: 'new' }], [place, place])).toEqual([
      { index: 0, by: 'place', of: { kind: 'standing', index: 0 } },
    ]);
  });

  test('50,000 at one position are each told once', () => {
    const many = Array.from({ length: 50_000 }, (_none, index) => ({ name: `${index}`, latitude: 0, longitude: 0 }));
    expect(findDuplicates(many)).toHaveLength(49_999);
  });
});
