import { MISSING_INT16 } from '../../conventions.ts';
import type { FindingList } from '../finding-list.ts';
import { quartilesOf } from './month-quartiles.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, leaveOut, type StepSpan, type TestedColumn, type TestedHours } from './tested-hours.ts';

const WIDEST_H = 3;
const LEAST_JUMP = 600;
const RANGES = 6;
const NEIGHBOURS_WITHIN = 300;

/**
 * Up to 3 hours between two that agree within 3 K, reached and left by opposite jumps of more than 6 K and of more than 6 times
 * the range of the middle half of the month's hourly changes: left out, and filled as a short gap.
 */
export function spikes(hours: TestedHours, findings: FindingList): void {
  for (const column of [hours.dryBulb, hours.dewPoint]) {
    const { bounds, values } = column;
    if (bounds.change <= LEAST_JUMP) continue;
    const changes = new MonthlyChanges(hours, values);
    for (const span of hours.unbroken) {
      let before = values[span.start] ?? MISSING_INT16;
      for (let step = span.start + 1; step < span.end - 1; step++) {
        const value = values[step] ?? MISSING_INT16;
        const jump = value - before;
        before = value;
        if (jump <= LEAST_JUMP && jump >= -LEAST_JUMP) continue;
        const end = endOfSpike(hours, { values, step, span, changes });
        if (end === null) continue;
        leaveOutSpike(hours, { column, start: step, end }, findings);
        step = end;
        before = values[end] ?? MISSING_INT16;
      }
    }
  }
}

/** The step after the spike; null where none begins. */
function endOfSpike(
  hours: TestedHours,
  at: { values: Int16Array; step: number; span: StepSpan; changes: MonthlyChanges },
): number | null {
  const { changes, span, step, values } = at;
  const before = values[step - 1] ?? MISSING_INT16;
  const top = values[step] ?? MISSING_INT16;
  if (before === MISSING_INT16 || top === MISSING_INT16) return null;
  const widest = Math.min(span.end - 1, step + WIDEST_H * hours.steps.stepsPerHour);
  for (let end = step + 1; end <= widest; end++) {
    const last = values[end - 1] ?? MISSING_INT16;
    const after = values[end] ?? MISSING_INT16;
    if (last === MISSING_INT16 || after === MISSING_INT16) return null;
    const inwards = top - before;
    const outwards = after - last;
    if (Math.sign(outwards) === Math.sign(inwards) || Math.abs(after - before) > NEIGHBOURS_WITHIN) continue;
    const least = Math.min(Math.abs(inwards), Math.abs(outwards));
    if (least > LEAST_JUMP && least > RANGES * changes.rangeAt(step)) return end;
  }
  return null;
}

/** How widely a column changes from step to step in each month; most files need that of no month. */
class MonthlyChanges {
  readonly #months: readonly StepSpan[];
  readonly #values: Int16Array;
  readonly #ranges = new Map<number, number>();

  constructor({ months }: TestedHours, values: Int16Array) {
    this.#months = months;
    this.#values = values;
  }

  /** Range of the middle half of the changes in the month that holds a step, 0.01 K. */
  rangeAt(step: number): number {
    const month = this.#months.find(({ end }) => step < end);
    if (month === undefined) return 0;
    const range = this.#ranges.get(month.start) ?? this.#rangeOf(month);
    this.#ranges.set(month.start, range);
    return range;
  }

  #rangeOf(month: StepSpan): number {
    const changes = new Int16Array(month.end - month.start).fill(MISSING_INT16);
    for (let at = month.start + 1; at < month.end; at++) {
      const value = this.#values[at] ?? MISSING_INT16;
      const before = this.#values[at - 1] ?? MISSING_INT16;
      if (value === MISSING_INT16 || before === MISSING_INT16) continue;
      changes[at - month.start] = Math.max(-32_767, Math.min(32_767, value - before));
    }
    const quartiles = quartilesOf(changes, 0, changes.length);
    return quartiles === null ? 0 : quartiles.upper - quartiles.lower;
  }
}

function leaveOutSpike(hours: TestedHours, spike: StepSpan & { column: TestedColumn }, findings: FindingList): void {
  const { column, end, start } = spike;
  const top = column.values[start] ?? 0;
  const before = column.values[start - 1] ?? 0;
  tellSpan(
    hours,
    {
      start,
      end,
      code: 'spike',
      severity: 'repair',
      variable: column.variable,
      done: 'left out and filled',
      sentence: () =>
        `the ${column.variable} jumps from ${degrees(before)} to ${degrees(top)} °C and back; ${end - start === 1 ? 'the value is' : 'the values are'} left out and filled as a short gap.`,
    },
    findings,
  );
  for (let step = start; step < end; step++) leaveOut(hours, step, column.bit);
}
