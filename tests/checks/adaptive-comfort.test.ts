import { expect, test } from 'vitest';
import { adaptiveLimit } from '#engine/hour-classes/adaptive-limit.ts';
import { heldCheck } from '../support/held-check.ts';

test('C01 ASHRAE 55 limits are as published, and a running mean outside the range is said so', () => {
  const answers = heldCheck('C01');
  expect(answers).toHaveLength(8);
  expect(answers.filter(({ input }) => input.startsWith('limit '))).toHaveLength(3);
});

test('C02 EN 16798-1 limits are as published, and a running mean outside the range is said so', () => {
  const answers = heldCheck('C02');
  expect(answers).toHaveLength(9);
  expect(answers.filter(({ input }) => input.startsWith('limit '))).toHaveLength(4);
});

test('a running mean outside the range takes the limit of the nearest end', () => {
  expect(adaptiveLimit('ashrae55-80', 40).upperC).toBe(adaptiveLimit('ashrae55-80', 33.5).upperC);
  expect(adaptiveLimit('en16798-ii', 31).upperC).toBe(adaptiveLimit('en16798-ii', 30).upperC);
  expect(adaptiveLimit('en16798-ii', 3).upperC).toBe(adaptiveLimit('en16798-ii', 10).upperC);
});
