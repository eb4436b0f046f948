import type { FindingList } from '../finding-list.ts';
import { linesPhrase } from '../finding-list.ts';
import { forEachRun, linesOfRun, type StepColumns } from './step-columns.ts';

/** Beyond these no hour is used: the fail limits for dry bulb and dew point, °C. Those of pressure are in `pressure-rule.ts`. */
export const DRY_BULB_LIMITS_C = { low: -90, high: 60 } as const;
export const DEW_POINT_LIMITS_C = { low: -100, high: 37 } as const;

/** Leaves out every dry bulb and dew point that no weather reaches. */
export function leaveOutImpossible(steps: StepColumns, findings: FindingList): void {
  leaveOut({ steps, column: steps.dryBulbC, name: 'dry bulb', limits: DRY_BULB_LIMITS_C }, findings);
  leaveOut({ steps, column: steps.dewPointC, name: 'dew point', limits: DEW_POINT_LIMITS_C }, findings);
}

function leaveOut(
  input: {
    steps: StepColumns;
    column: Float64Array;
    name: 'dry bulb' | 'dew point';
    limits: { low: number; high: number };
  },
  findings: FindingList,
): void {
  const { column, name, limits, steps } = input;
  forEachRun(markOutside(column, limits), (start, end) => {
    const values = column.subarray(start, end);
    const worst = values.reduce((far, value) => (Math.abs(value) > Math.abs(far) ? value : far), 0);
    const { first, last } = linesOfRun(steps.lines, start, end);
    findings.add({
      code: 'range',
      severity: 'doubt',
      line: first,
      lastLine: last,
      count: end - start,
      variable: name,
      done: 'left out',
      message: () =>
        `${linesPhrase(first, last)}: a ${name} of ${worst} °C lies outside ${limits.low} to ${limits.high} °C; ${end - start === 1 ? 'the value is' : 'the values are'} left out.`,
    });
    values.fill(Number.NaN);
  });
}

function markOutside(column: Float64Array, limits: { low: number; high: number }): Uint8Array {
  const marks = new Uint8Array(column.length);
  for (let step = 0; step < column.length; step++) {
    const value = column[step] ?? Number.NaN;
    if (value < limits.low || value > limits.high) marks[step] = 1;
  }
  return marks;
}
