import { readFileSync } from 'node:fs';
import { expect } from 'vitest';
import type { CheckAnswer } from '#engine/checks/published-check.ts';
import { runCheck } from '#engine/checks/run-check.ts';
import { publishedChecks } from './published-values.ts';

const tables = {
  'golden-wetbulb.csv': readFileSync(new URL('../../data/checks/golden-wetbulb.csv', import.meta.url), 'utf8'),
};

/** Runs a check of data/checks as the method page does. @returns its answers, every one of which holds */
export function heldCheck(id: string): readonly CheckAnswer[] {
  const check = publishedChecks.find((each) => each.id === id);
  if (check === undefined) throw new Error(`no check ${id} in data/checks`);
  const answers = runCheck(check, tables);
  expect(answers.filter(({ holds }) => !holds)).toEqual([]);
  return answers;
}
