import { floatColumn } from '../../float-column.ts';
import type { SourceRows } from './source-rows.ts';

/**
 * The values of one year on its calendar before they become hours: `stepsPerHour` steps in each slot (1 in an hourly file),
 * in time order, NaN where missing. The tests of the assembly write into these columns.
 */
export interface StepColumns {
  readonly slotCount: number;
  readonly stepsPerHour: number;
  /** Line of the file, 0 where no row stands. */
  readonly lines: Uint32Array;
  readonly dryBulbC: Float64Array;
  readonly dewPointC: Float64Array;
  readonly relativeHumidityPct: Float64Array;
  readonly pressurePa: Float64Array;
  /** Values that the source calls interpolated or modelled, and values that we changed: bits of `VALUE`. */
  readonly estimated: Uint8Array;
  readonly repaired: Uint8Array;
}

/** Lays rows on the calendar. @param input.rowOfStep row of each step, -1 where there is none */
export function stepColumns(input: {
  rows: SourceRows;
  rowOfStep: Int32Array;
  slotCount: number;
  stepsPerHour: number;
}): StepColumns {
  const { rows, rowOfStep } = input;
  // Row -1 is no row: reading it gives undefined, which is missing.
  const column = (values: readonly number[]) =>
    floatColumn(rowOfStep.length, (step) => values[rowOfStep[step] ?? -1] ?? Number.NaN);
  return {
    slotCount: input.slotCount,
    stepsPerHour: input.stepsPerHour,
    lines: Uint32Array.from(rowOfStep, (row) => (row < 0 ? 0 : (rows.lines[row] ?? 0))),
    dryBulbC: column(rows.dryBulbC),
    dewPointC: column(rows.dewPointC),
    relativeHumidityPct: column(rows.relativeHumidityPct),
    pressurePa: column(rows.pressurePa),
    estimated: Uint8Array.from(rowOfStep, (row) => (row < 0 ? 0 : (rows.estimated[row] ?? 0))),
    repaired: new Uint8Array(rowOfStep.length),
  };
}

/** Calls `each` for every unbroken run of steps that hold; `end` is the step after the last. */
export function forEachRun(
  length: number,
  holds: (step: number) => boolean,
  each: (start: number, end: number) => void,
): void {
  for (let step = 0; step < length; step++) {
    if (!holds(step)) continue;
    const start = step;
    while (step < length && holds(step)) step++;
    each(start, step);
  }
}

/** First and last line of the file within a run of steps; zeros when no row stands there. */
export function linesOfRun(lines: Uint32Array, start: number, end: number): { first: number; last: number } {
  let first = 0;
  let last = 0;
  for (let step = start; step < end; step++) {
    const line = lines[step] ?? 0;
    if (line === 0) continue;
    if (first === 0 || line < first) first = line;
    if (line > last) last = line;
  }
  return { first, last };
}
