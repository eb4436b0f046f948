import type { CheckAnswer, CheckTables, PublishedCase } from './published-check.ts';

/** How a check is computed: one answer or more for each of its cases. */
export type CheckRunner = (cases: readonly PublishedCase[], tables: CheckTables) => readonly CheckAnswer[];

/** A check whose cases stand each for itself. */
export function eachCase(answer: (each: PublishedCase, tables: CheckTables) => readonly CheckAnswer[]): CheckRunner {
  return (cases, tables) => cases.flatMap((each) => answer(each, tables));
}
