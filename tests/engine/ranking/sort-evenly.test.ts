import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { sortEvenly } from '#engine/ranking/sort-evenly.ts';
import { propertySettings } from '../../support/sample-size.ts';

const sortedBy = (keys: Float64Array) => {
  const sorted = new Float64Array(keys.length);
  sortEvenly(keys.length)(keys, sorted);
  return sorted;
};

test('sorts any finite numbers as the language does', () => {
  const numbers = fc.array(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e300, max: 1e300 }), {
    maxLength: 80,
  });
  const property = fc.property(numbers, (values) => {
    // A zero has two signs, of which keys have one.
    const keys = Float64Array.from(values, (value) => value + 0);
    expect(sortedBy(keys)).toEqual(Float64Array.from(keys).sort());
  });
  fc.assert(property, propertySettings(200));
});

test('sorts numbers of which all but one crowd at an end, all are equal, or there are none', () => {
  const crowd = Float64Array.from({ length: 500 }, (_none, at) => (at === 250 ? 1e15 : (at * 7919) % 501));
  expect(sortedBy(crowd)).toEqual(Float64Array.from(crowd).sort());
  expect(sortedBy(new Float64Array(30).fill(4))).toEqual(new Float64Array(30).fill(4));
  expect(sortedBy(new Float64Array(0))).toEqual(new Float64Array(0));
});
