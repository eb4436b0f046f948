/** The one place that says how a published check is computed: its tests and the method page both ask here. */
import type { CheckRunner } from './check-runner.ts';
import { coolingChecks } from './cooling-checks.ts';
import { decisionChecks } from './decision-checks.ts';
import { interpolationChecks } from './interpolation-checks.ts';
import { limitChecks } from './limit-checks.ts';
import { moistAirChecks } from './moist-air-checks.ts';
import type { CheckAnswer, CheckTables, PublishedCheck } from './published-check.ts';
import { yearChecks } from './year-checks.ts';

const runners: Readonly<Record<string, CheckRunner>> = {
  ...moistAirChecks,
  ...coolingChecks,
  ...limitChecks,
  ...yearChecks,
  ...decisionChecks,
  ...interpolationChecks,
};

/** Checks whose formula is another's: the product computes no such thing, or compares with it. */
export const comparisonChecks: readonly string[] = ['C05', 'D01', 'E05', 'N01', 'P12', 'P13'];

/** Ids of the checks that can be run. */
export const runnableChecks: readonly string[] = Object.keys(runners);

/**
 * Runs every case of a check in the engine.
 * @throws RangeError for a check that nobody says how to compute; TypeError for a case without a field that it needs
 */
export function runCheck(check: PublishedCheck, tables: CheckTables): readonly CheckAnswer[] {
  const run = runners[check.id];
  if (run === undefined) throw new RangeError(`nothing says how check ${check.id} is computed`);
  return run(check.cases, tables);
}
