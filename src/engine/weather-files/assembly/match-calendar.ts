/**
 * Rows are matched to a calendar that is built first. The order is that of month, day and hour as they stand in the file:
 * a typical year is made of months of different years, so the year decides nothing here. Every fault of order is told by the one walk over the rows: one file, and long for it.
 */
import { HOURS_PER_DAY, SLOTS_PER_LEAP_YEAR, SLOTS_PER_YEAR } from '../../conventions.ts';
import { monthNames, monthStartSlots, slotOf } from '../../reduction/calendar.ts';
import { type FindingList, linesPhrase, whole } from '../finding-list.ts';
import type { SourceRows } from './source-rows.ts';

/** A period that the file declares, dates without a year; null where the date could not be read. */
export interface DeclaredPeriod {
  readonly name: string;
  /** 0 Sunday to 6 Saturday; null when it is not said. */
  readonly startWeekday: number | null;
  readonly start: { readonly month: number; readonly day: number } | null;
  readonly end: { readonly month: number; readonly day: number } | null;
}

export interface MatchedCalendar {
  readonly slotCount: number;
  readonly stepsPerHour: number;
  /** Row of each step (slot x stepsPerHour), -1 where the file has none. */
  readonly rowOfStep: Int32Array;
  /** Rows that belong to the period that was read; later periods wait for an answer. */
  readonly rowsRead: number;
  /** Whether the rows are the steps, one for one, as in nearly every file of a year. */
  readonly inPlace: boolean;
}

interface Walk {
  readonly rowOfStep: Int32Array;
  readonly repeats: { row: number; firstRow: number; equal: boolean }[];
  readonly outOfOrder: number[];
  rowsRead: number;
}

/**
 * @param input.sortable rows out of order may be sorted: only within one real year
 */
export function matchCalendar(
  input: { rows: SourceRows; stepsPerHour: number; periods: readonly DeclaredPeriod[]; sortable: boolean },
  findings: FindingList,
): MatchedCalendar {
  const { rows, stepsPerHour } = input;
  const slotCount = holdsLeapDay(rows) ? SLOTS_PER_LEAP_YEAR : SLOTS_PER_YEAR;
  const steps = stepOfEachRow(rows, stepsPerHour, slotCount);
  const inPlace = input.periods.length <= 1 && steps.length === slotCount * stepsPerHour && isCounted(steps);
  const walk: Walk = inPlace
    ? { rowOfStep: steps, repeats: [], outOfOrder: [], rowsRead: steps.length }
    : placeRows(input, steps, slotCount);
  if (walk.rowsRead < rows.lines.length) askAboutPeriods(input, walk.rowsRead, findings);
  else if (input.periods.length > 1) askAboutPeriods(input, walk.rowsRead, findings);
  tellRepeats(input, walk, slotCount, findings);
  tellOrder(input, walk, findings);
  return { slotCount, stepsPerHour, rowOfStep: walk.rowOfStep, rowsRead: walk.rowsRead, inPlace };
}

/** Whether the values are 0, 1, 2 and so on. */
function isCounted(steps: Int32Array): boolean {
  let row = 0;
  while (row < steps.length && steps[row] === row) row++;
  return row === steps.length;
}

/** The step of each row. Minutes run 60/n .. 60, or 0 .. 60 - 60/n in files that never write 60. */
function stepOfEachRow(rows: SourceRows, stepsPerHour: number, slotCount: number): Int32Array {
  const { days, hours, minutes, months } = rows;
  const writes60 = minutes.includes(60);
  const stepMinutes = 60 / stepsPerHour;
  const starts = monthStartSlots(slotCount);
  const steps = new Int32Array(rows.lines.length);
  for (let row = 0; row < steps.length; row++) {
    // Hour 0 is the last of the day before.
    const slot = (starts[(months[row] ?? 1) - 1] ?? 0) + ((days[row] ?? 1) - 1) * HOURS_PER_DAY + (hours[row] ?? 1) - 1;
    if (stepsPerHour === 1) {
      steps[row] = Math.max(0, slot);
      continue;
    }
    const minute = minutes[row] ?? 0;
    const within = writes60 ? Math.ceil(minute / stepMinutes) - 1 : Math.floor(minute / stepMinutes);
    steps[row] = Math.max(0, slot) * stepsPerHour + Math.min(stepsPerHour - 1, Math.max(0, within));
  }
  return steps;
}

function holdsLeapDay({ days, months }: SourceRows): boolean {
  for (let row = 0; row < days.length; row++) if (days[row] === 29 && months[row] === 2) return true;
  return false;
}

function placeRows(
  input: { rows: SourceRows; stepsPerHour: number; periods: readonly DeclaredPeriod[] },
  steps: Int32Array,
  slotCount: number,
): Walk {
  const stepCount = slotCount * input.stepsPerHour;
  const rowOfStep = new Int32Array(stepCount).fill(-1);
  const walk: Walk = { rowOfStep, repeats: [], outOfOrder: [], rowsRead: 0 };
  const severalPeriods = input.periods.length > 1;
  const lastDay = stepCount - 24 * input.stepsPerHour;
  let previous = -1;
  let highest = -1;
  let wrapped = false;
  for (let row = 0; row < steps.length; row++) {
    const step = steps[row] ?? 0;
    const firstRow = rowOfStep[step] ?? -1;
    const wraps = step < 24 * input.stepsPerHour && previous >= lastDay;
    // A second time round the calendar is another period, and so is the declared start of the next one.
    if ((wraps || wrapped) && firstRow >= 0) break;
    if (severalPeriods && row > 0 && startsNextPeriod(input, row, firstRow >= 0)) break;
    if (wraps) {
      wrapped = true;
      highest = -1;
    }
    if (firstRow >= 0) walk.repeats.push({ row, firstRow, equal: sameValues(input.rows, row, firstRow) });
    else {
      if (step < highest) walk.outOfOrder.push(row);
      rowOfStep[step] = row;
    }
    highest = Math.max(highest, step);
    previous = step;
    walk.rowsRead = row + 1;
  }
  return walk;
}

/** Whether a row opens the second declared period: its start date, after the end of the first or over it. */
function startsNextPeriod(
  input: { rows: SourceRows; periods: readonly DeclaredPeriod[] },
  row: number,
  occupied: boolean,
): boolean {
  const first = input.periods[0];
  const next = input.periods[1];
  if (first?.end == null || next?.start == null) return false;
  const { months, days } = input.rows;
  const starts = months[row] === next.start.month && days[row] === next.start.day;
  const after = months[row - 1] === first.end.month && days[row - 1] === first.end.day;
  return starts && (after || occupied) && (days[row] !== days[row - 1] || months[row] !== months[row - 1]);
}

function sameValues(rows: SourceRows, a: number, b: number): boolean {
  const columns = [rows.dryBulbC, rows.dewPointC, rows.relativeHumidityPct, rows.pressurePa];
  return columns.every((column) => Object.is(column[a], column[b]));
}

function askAboutPeriods(
  input: { rows: SourceRows; periods: readonly DeclaredPeriod[] },
  rowsRead: number,
  findings: FindingList,
): void {
  const { lines } = input.rows;
  const nextLine = lines[rowsRead] ?? null;
  const name = input.periods[0]?.name ?? '';
  const first = name === '' ? 'the first' : `the first, ${name}`;
  const declared = input.periods.length > 1 ? `declares ${input.periods.length} periods` : 'holds more than one year';
  const from = nextLine === null ? '' : `; the second begins on line ${nextLine}`;
  findings.ask('several-periods', {
    line: nextLine,
    lastLine: nextLine === null ? null : (lines.at(-1) ?? null),
    count: lines.length - rowsRead,
    message: () =>
      `The file ${declared}${from}. Periods are never joined to one year unasked: only the first has been read. Say which period counts, or bring one file for each.`,
    proposal: `Read ${first}.`,
  });
}

/** Consecutive entries are told as one finding. */
function tellRepeats(
  input: { rows: SourceRows; stepsPerHour: number },
  walk: Walk,
  slotCount: number,
  findings: FindingList,
): void {
  const { lines } = input.rows;
  if (walk.repeats.length === 0) return;
  const absent = walk.rowOfStep.reduce((count, row) => count + (row < 0 ? 1 : 0), 0);
  for (let at = 0; at < walk.repeats.length; ) {
    const first = walk.repeats[at];
    if (first === undefined) return;
    let end = at + 1;
    while (walk.repeats[end]?.equal === first.equal && walk.repeats[end]?.row === first.row + end - at) end++;
    const last = walk.repeats[end - 1] ?? first;
    const count = end - at;
    const where = { line: lines[first.row] ?? null, lastLine: lines[last.row] ?? null, count };
    const copy = linesPhrase(lines[first.row] ?? 0, lines[last.row] ?? 0);
    const original = linesPhrase(lines[first.firstRow] ?? 0, lines[last.firstRow] ?? 0).toLowerCase();
    if (first.equal) {
      const message = () =>
        `${copy} repeat${count === 1 ? 's' : ''} the time and the values of ${original}; the second copy is left out.`;
      findings.add({ code: 'time-repeat', severity: 'doubt', ...where, message });
    } else {
      const day =
        count === 24 * input.stepsPerHour && absent === count
          ? absentDay(walk.rowOfStep, input.stepsPerHour, slotCount)
          : null;
      const message = () =>
        `${copy} carr${count === 1 ? 'ies' : 'y'} the time of ${original} with other values; the first ${count === 1 ? 'is' : 'are'} kept. Say which ${count === 1 ? 'is' : 'are'} right, or mend the dates in the file.`;
      const proposal =
        day === null ? 'Keep the first.' : `The second copy is ${day}, which is absent: its date is wrong.`;
      findings.ask('time-repeat', { ...where, message, proposal });
      if (day !== null && findings.answers['time-repeat'] === 'absent day') moveToAbsentDay(walk, first.row);
    }
    at = end;
  }
}

/** Lays the second copy of a day on the day that is absent. */
function moveToAbsentDay({ rowOfStep }: Walk, firstRow: number): void {
  const start = rowOfStep.indexOf(-1);
  for (let step = start; step < rowOfStep.length && rowOfStep[step] === -1; step++) {
    rowOfStep[step] = firstRow + step - start;
  }
}

/** The one day that is absent, as words; null when the absent hours are not one whole day. */
function absentDay(rowOfStep: Int32Array, stepsPerHour: number, slotCount: number): string | null {
  const start = rowOfStep.indexOf(-1);
  const perDay = 24 * stepsPerHour;
  if (start % perDay !== 0 || rowOfStep.lastIndexOf(-1) !== start + perDay - 1) return null;
  for (let month = 12; month >= 1; month--) {
    const first = slotOf({ month, day: 1, hour: 1 }, slotCount) ?? 0;
    const slot = start / stepsPerHour;
    if (slot >= first) return `${(slot - first) / 24 + 1} ${monthNames[month - 1]}`;
  }
  return null;
}

function tellOrder(input: { rows: SourceRows; sortable: boolean }, walk: Walk, findings: FindingList): void {
  const { lines } = input.rows;
  const firstRow = walk.outOfOrder[0];
  if (firstRow === undefined) return;
  if (input.sortable) {
    findings.add({
      code: 'time-order',
      severity: 'repair',
      line: lines[firstRow] ?? null,
      lastLine: lines[walk.outOfOrder.at(-1) ?? firstRow] ?? null,
      count: walk.outOfOrder.length,
      message: () =>
        `${whole(walk.outOfOrder.length)} rows stand earlier in the calendar than a row before them, first on line ${lines[firstRow]}. The file holds one real year, so they have been sorted.`,
    });
    return;
  }
  for (const row of walk.outOfOrder) {
    const line = lines[row] ?? null;
    findings.add({
      code: 'time-order',
      severity: 'refuse',
      line,
      message: () =>
        `Line ${line}: ${input.rows.days[row]} ${monthNames[(input.rows.months[row] ?? 1) - 1]}, hour ${input.rows.hours[row]}, comes before the row above it. Rows can be sorted only within one real year; put them in the order of the calendar.`,
    });
  }
}
