import fc from 'fast-check';
import { expect, test } from 'vitest';
import { canonicalJson } from '#engine/brief/canonical-json.ts';

test('keys are sorted, numbers stand as they are, undefined fields are left out', () => {
  expect(canonicalJson({ b: [1, 0.1, null], a: { d: 'ü', c: undefined }, B: -0 })).toBe(
    '{"B":0,"a":{"d":"ü"},"b":[1,0.1,null]}',
  );
});

test('the order in which fields were written moves nothing', () => {
  fc.assert(
    fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (value) => {
      const turned = Object.fromEntries(Object.entries(value).toReversed());
      expect(canonicalJson(turned)).toBe(canonicalJson(value));
      expect(JSON.parse(canonicalJson(value))).toEqual(JSON.parse(JSON.stringify(value)));
    }),
    { numRuns: 500 },
  );
});

test.each([[Number.NaN], [Number.POSITIVE_INFINITY], [undefined], [new Uint8Array(2)], [() => 1], [10n]])(
  '%s has no canonical text and is refused, located',
  (value) => {
    expect(() => canonicalJson({ deep: [value] })).toThrow(/deep\[0\]/);
  },
);
