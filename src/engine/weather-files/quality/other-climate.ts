import { MISSING_INT16 } from '../../conventions.ts';
import type { FindingList } from '../finding-list.ts';
import { extremesOf, type Quartiles, quartilesOf } from './month-quartiles.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, leaveOut, type StepSpan, type TestedColumn, type TestedHours } from './tested-hours.ts';

const RANGES = 6;
/**
 * 15 K for the dry bulb. Twice as much for the dew point (ours): air that sinks from above lowers it by 20 K within hours, and
 * those are the hours with the most depression.
 */
const AT_LEAST = { 'dry bulb': 1_500, 'dew point': 3_000 } as const;

/**
 * Values of another climate: further from the median of their month than 6 times the range of its middle half, and further than
 * any weather goes. They are left out.
 */
export function otherClimate(hours: TestedHours, findings: FindingList): void {
  for (const column of [hours.dryBulb, hours.dewPoint]) {
    for (const [index, month] of hours.months.entries()) {
      if ((column.bounds.monthRanges[index] ?? 0) < AT_LEAST[column.variable]) continue;
      const extremes = extremesOf(column.values, month.start, month.end);
      if (extremes === null || extremes.most - extremes.least < AT_LEAST[column.variable]) continue;
      const quartiles = quartilesOf(column.values, month.start, month.end);
      if (quartiles === null) continue;
      const far = Math.max(RANGES * (quartiles.upper - quartiles.lower), AT_LEAST[column.variable]);
      if (quartiles.median - extremes.least < far && extremes.most - quartiles.median < far) continue;
      leaveOutFar(hours, { column, month, quartiles, far }, findings);
    }
  }
}

function leaveOutFar(
  hours: TestedHours,
  input: { column: TestedColumn; month: StepSpan; quartiles: Quartiles; far: number },
  findings: FindingList,
): void {
  const { column, far, month, quartiles } = input;
  const { median } = quartiles;
  const isFar = (step: number) => {
    const value = column.values[step] ?? MISSING_INT16;
    return value !== MISSING_INT16 && Math.abs(value - median) >= far;
  };
  for (let step = month.start; step < month.end; step++) {
    if (!isFar(step)) continue;
    const start = step;
    let worst = median;
    for (; step < month.end && isFar(step); step++) {
      const value = column.values[step] ?? median;
      if (Math.abs(value - median) > Math.abs(worst - median)) worst = value;
      leaveOut(hours, step, column.bit);
      hours.failedAlone.push(step);
    }
    tellSpan(
      hours,
      {
        start,
        end: step,
        code: 'other-climate',
        severity: 'doubt',
        variable: column.variable,
        done: 'left out',
        sentence: () =>
          `a ${column.variable} of ${degrees(worst)} °C belongs to another climate: the median of the month is ${degrees(median)} °C, and half of its hours lie within ${degrees(quartiles.upper - quartiles.lower)} K. It is left out.`,
      },
      findings,
    );
  }
}
