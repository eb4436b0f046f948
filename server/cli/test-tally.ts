import { existsSync, readFileSync } from 'node:fs';
import * as z from 'zod/mini';
import type { ToolOutcome } from './run-tool.ts';

/** What CI and people read at the end. */
export interface Tally {
  readonly passed: number;
  readonly failed: number;
  readonly skipped: number;
}

export const nothing: Tally = { passed: 0, failed: 0, skipped: 0 };

export function add(a: Tally, b: Tally): Tally {
  return { passed: a.passed + b.passed, failed: a.failed + b.failed, skipped: a.skipped + b.skipped };
}

/** The closing line. */
export function closingLine({ passed, failed, skipped }: Tally): string {
  return `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
}

/** The part that we read of the report that vitest writes. */
const Report = z.object({
  numPassedTests: z.int(),
  numFailedTests: z.int(),
  numPendingTests: z.int(),
  numTodoTests: z.int(),
  testResults: z.array(
    z.object({ name: z.string(), status: z.string(), assertionResults: z.array(z.object({ status: z.string() })) }),
  ),
});

/** A test that prints is a failing test: its words would hide those that matter. */
const NOISE = /^(stdout|stderr) \| /m;

/** Counts one run of vitest. Whatever made it fail counts, also where no single test did: a file that does not load, an error outside tests, noise. */
export function tallyOf(outcome: ToolOutcome, reportFile: string): Tally {
  if (!existsSync(reportFile)) return { passed: 0, failed: 1, skipped: 0 };
  const report = z.parse(Report, JSON.parse(readFileSync(reportFile, 'utf8')));
  const brokenFiles = report.testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && assertionResults.every((one) => one.status !== 'failed'),
  ).length;
  const counted = report.numFailedTests + brokenFiles + (NOISE.test(outcome.output) ? 1 : 0);
  return {
    passed: report.numPassedTests,
    failed: counted === 0 && outcome.code !== 0 ? 1 : counted,
    skipped: report.numPendingTests + report.numTodoTests,
  };
}
