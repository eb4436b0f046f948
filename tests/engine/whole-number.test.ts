import fc from 'fast-check';
import { expect, test } from 'vitest';
import { wholeNumber } from '#engine/whole-number.ts';
import { propertySettings } from '../support/sample-size.ts';

// The language's own rounding is the outside truth.
const rounded = (value: number) => Math.round(value) + 0;

test.each([
  0, 0.5, -0.5, 1.5, -1.5, 2.5, -2.5, 0.49999999999999994, -0.49999999999999994, -0.5000000000000001, 12.5,
  -12.499999999999998, 32_767.5, -32_768.5, 65_534.5, 2_147_483_646.4, -2_147_483_647.4,
])('%d is rounded halves upwards', (value) => {
  expect(wholeNumber(value) + 0).toBe(rounded(value));
});

test('any number within 32 bits is rounded as the language rounds it', () => {
  const halves = fc.integer({ min: -70_000, max: 70_000 }).map((whole) => whole + 0.5);
  const near = fc
    .tuple(halves, fc.constantFrom(-1, 0, 1))
    .map(([half, step]) => half + step * Math.abs(half) * 2 ** -52);
  const any = fc.double({ min: -2e9, max: 2e9, noNaN: true });
  fc.assert(
    fc.property(fc.oneof(halves, near, any), (value) => wholeNumber(value) + 0 === rounded(value)),
    propertySettings(2000),
  );
});

test('what is not a number is 0', () => {
  expect(wholeNumber(Number.NaN)).toBe(0);
});
