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

/**
 * Lays rows on the calendar. Rows that are the steps already become them, so nobody may look at their values as rows afterwards.
 * @param input.rowOfStep row of each step, -1 where there is none
 * @param input.inPlace whether each row is the step of its own number
 */
export function stepColumns(input: {
  rows: SourceRows;
  rowOfStep: Int32Array;
  slotCount: number;
  stepsPerHour: number;
  inPlace: boolean;
}): StepColumns {
  const { rows, rowOfStep } = input;
  if (input.inPlace) return columnsInPlace(rows, input);
  return {
    slotCount: input.slotCount,
    stepsPerHour: input.stepsPerHour,
    lines: linesOnSteps(rows.lines, rowOfStep),
    dryBulbC: onSteps(rows.dryBulbC, rowOfStep),
    dewPointC: onSteps(rows.dewPointC, rowOfStep),
    relativeHumidityPct: onSteps(rows.relativeHumidityPct, rowOfStep),
    pressurePa: onSteps(rows.pressurePa, rowOfStep),
    estimated: bitsOnSteps(rows.estimated, rowOfStep),
    repaired: new Uint8Array(rowOfStep.length),
  };
}

function columnsInPlace(rows: SourceRows, calendar: { slotCount: number; stepsPerHour: number }): StepColumns {
  return {
    slotCount: calendar.slotCount,
    stepsPerHour: calendar.stepsPerHour,
    lines: rows.lines,
    dryBulbC: rows.dryBulbC,
    dewPointC: rows.dewPointC,
    relativeHumidityPct: rows.relativeHumidityPct,
    pressurePa: rows.pressurePa,
    estimated: rows.estimated,
    repaired: new Uint8Array(rows.lines.length),
  };
}

// One function for each kind of column, and nothing after the loop, or the machine's compiler sees several kinds in one place.
function linesOnSteps(lines: Uint32Array, rowOfStep: Int32Array): Uint32Array {
  const column = new Uint32Array(rowOfStep.length);
  for (let step = 0; step < rowOfStep.length; step++) {
    const row = rowOfStep[step] ?? -1;
    if (row >= 0) column[step] = lines[row] ?? 0;
  }
  return column;
}

function bitsOnSteps(bits: Uint8Array, rowOfStep: Int32Array): Uint8Array {
  const column = new Uint8Array(rowOfStep.length);
  for (let step = 0; step < rowOfStep.length; step++) {
    const row = rowOfStep[step] ?? -1;
    if (row >= 0) column[step] = bits[row] ?? 0;
  }
  return column;
}

function onSteps(values: Float64Array, rowOfStep: Int32Array): Float64Array {
  const column = new Float64Array(rowOfStep.length);
  for (let step = 0; step < rowOfStep.length; step++) {
    const row = rowOfStep[step] ?? -1;
    column[step] = row < 0 ? Number.NaN : (values[row] ?? Number.NaN);
  }
  return column;
}

/** Calls `each` for every unbroken run of steps that are marked with 1; `end` is the step after the last. */
export function forEachRun(marks: Uint8Array, each: (start: number, end: number) => void): void {
  // The search of the language looks at bytes by the dozen, and in most files nothing is marked.
  for (let start = marks.indexOf(1); start >= 0; ) {
    let end = start + 1;
    while (marks[end] === 1) end++;
    each(start, end);
    start = marks.indexOf(1, end);
  }
}

/** Marks with 1 the steps whose value is missing. */
export function markMissing(column: Float64Array): Uint8Array {
  const marks = new Uint8Array(column.length);
  for (let step = 0; step < column.length; step++) if (Number.isNaN(column[step])) marks[step] = 1;
  return marks;
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
