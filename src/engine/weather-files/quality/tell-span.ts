import { linesOfRun } from '../assembly/step-columns.ts';
import type { FindingCode, FindingVariable, Severity } from '../finding.ts';
import { type FindingList, linesPhrase } from '../finding-list.ts';
import type { TestedHours } from './tested-hours.ts';

/** Tells what was found in the steps from `start` to the one before `end`; the sentence follows on the lines. */
export function tellSpan(
  hours: TestedHours,
  span: {
    readonly start: number;
    readonly end: number;
    /** Steps concerned, where they are not all of the span. */
    readonly steps?: number;
    readonly code: FindingCode;
    readonly severity: Severity;
    readonly variable: FindingVariable;
    readonly done: string;
    readonly sentence: () => string;
  },
  findings: FindingList,
): void {
  const { start, end, code, severity, variable, done, sentence } = span;
  const { first, last } = linesOfRun(hours.steps.lines, start, end);
  const concerned = (span.steps ?? end - start) / hours.steps.stepsPerHour;
  findings.add({
    code,
    severity,
    variable,
    done,
    line: first,
    lastLine: last,
    count: Math.max(1, Math.round(concerned)),
    message: () => `${linesPhrase(first, last)}: ${sentence()}`,
  });
}
