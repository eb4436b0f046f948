import { RowCollector } from '../assembly/row-collector.ts';
import { emptyRow, type SourceRow, type SourceRows } from '../assembly/source-rows.ts';
import { type FindingList, whole } from '../finding-list.ts';
import { Frequencies } from '../frequencies.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import { type FieldBounds, FULL_FIELDS, findFields, flagsOf, NEEDED_FIELDS, readTime, readValues } from './epw-row.ts';
import { FieldCounts } from './field-counts.ts';
import { PlainRowReader } from './plain-row.ts';
import { SourceFlags } from './source-flags.ts';

export interface EpwRows {
  readonly rows: SourceRows;
  /** Whether the flags of dry bulb and dew point vary through the file. */
  readonly flagsInformative: boolean;
}

/** Two leap years of one-minute records. */
const MOST_ROWS = 2 * 8784 * 60;
/** A number of fields that so many rows share is a layout of the file; a rarer one is a damaged row. */
const LAYOUT_SHARE = 0.01;
interface Progress {
  readonly rows: RowCollector;
  /** Fields of each row kept, at most `FULL_FIELDS`. */
  readonly fieldCounts: FieldCounts;
  readonly bounds: FieldBounds;
  readonly flags: SourceFlags;
  longRows: number;
  firstLongLine: number;
}

/** Reads every data record; every fault in it is told. */
export function readEpwRows(cursor: LineCursor, findings: FindingList): EpwRows {
  const progress: Progress = {
    rows: new RowCollector(),
    fieldCounts: new FieldCounts(),
    bounds: { starts: new Int32Array(NEEDED_FIELDS + 2), count: 0 },
    flags: new SourceFlags(cursor.text.bytes),
    longRows: 0,
    firstLongLine: 0,
  };
  const { bytes, lines } = cursor.text;
  const plain = lines === null ? null : new PlainRowReader(bytes, lines);
  const row = emptyRow();
  for (let records = 1; ; records++) {
    if (plain !== null) records += passPlainRows(cursor, progress, { plain, most: MOST_ROWS - records + 1 });
    if (!cursor.next()) break;
    if (records > MOST_ROWS) {
      tellTooMany(cursor, findings);
      break;
    }
    findFields(cursor, progress.bounds);
    if (cutShort(cursor, progress)) tellTruncated(cursor, progress, findings);
    else readRow(cursor, progress, row, findings);
  }
  tellLongRows(progress, findings);
  const rows = progress.rows.finish();
  leaveOutDamagedRows(progress.fieldCounts, rows, findings);
  // Flags that say the same of every row tell nothing of any of them.
  if (!progress.flags.vary) rows.estimated.fill(0);
  return { rows, flagsInformative: progress.flags.vary };
}

/** Reads the rows ahead as long as they are plain, at most so many. @returns how many */
function passPlainRows(
  cursor: LineCursor,
  progress: Progress,
  { plain, most }: { plain: PlainRowReader; most: number },
): number {
  const { lines } = cursor.text;
  const { flags, rows } = progress;
  let passed = 0;
  for (;;) {
    rows.makeRoom();
    const before = cursor.linesBefore;
    const taken = plain.readInto(rows, { start: cursor.ahead, line: before, most: most - passed }, flags);
    if (taken === 0) return passed;
    if (lines !== null) noteLengths(progress, lines.commas.subarray(before, before + taken), before + 1);
    rows.take(taken);
    cursor.pass(taken);
    passed += taken;
  }
}

/** A last line without its end and with fewer fields than the others. */
function cutShort(cursor: LineCursor, progress: Progress): boolean {
  const usual = progress.fieldCounts.last ?? NEEDED_FIELDS;
  return !cursor.closed && progress.bounds.count < usual;
}

function tellTruncated(cursor: LineCursor, progress: Progress, findings: FindingList): void {
  const { line } = cursor;
  const { count } = progress.bounds;
  findings.add({
    code: 'truncated',
    severity: 'repair',
    line,
    message: () =>
      `Line ${line}, the last, is cut short: it has ${count} ${count === 1 ? 'field' : 'fields'} and no line end. It is left out. If more is missing, bring the file anew from its source.`,
  });
}

function readRow(cursor: LineCursor, progress: Progress, row: SourceRow, findings: FindingList): void {
  const { bounds } = progress;
  const { line } = cursor;
  if (bounds.count < NEEDED_FIELDS) {
    const { count } = bounds;
    findings.add({
      code: 'field-count',
      severity: 'refuse',
      line,
      message: () =>
        `Line ${line} has ${count} ${count === 1 ? 'field' : 'fields'}, where a data record has ${FULL_FIELDS} and at least ${NEEDED_FIELDS} are needed. Mend the line, or bring the file anew from its source.`,
    });
    return;
  }
  noteLength(progress, bounds.count, line);
  const placed = readTime(cursor, bounds, row, findings);
  readValues(cursor, bounds, row, findings);
  if (!placed) return;
  const { start, end } = flagsOf(bounds);
  row.line = line;
  row.estimated = progress.flags.take(start, end);
  progress.fieldCounts.add(Math.min(bounds.count, FULL_FIELDS));
  progress.rows.add(row);
}

/** @param firstLine line of the first of the rows */
function noteLengths(progress: Progress, commas: Int32Array, firstLine: number): void {
  const { fieldCounts } = progress;
  for (let row = 0; row < commas.length; row++) {
    const fieldCount = (commas[row] ?? 0) + 1;
    if (fieldCount > FULL_FIELDS) noteLength(progress, fieldCount, firstLine + row);
    fieldCounts.add(Math.min(fieldCount, FULL_FIELDS));
  }
}

function noteLength(progress: Progress, fieldCount: number, line: number): void {
  if (fieldCount <= FULL_FIELDS) return;
  progress.longRows++;
  if (progress.firstLongLine === 0) progress.firstLongLine = line;
}

function tellTooMany(cursor: LineCursor, findings: FindingList): void {
  const { line } = cursor;
  findings.add({
    code: 'row-count',
    severity: 'refuse',
    line,
    message: () =>
      `The file has more than ${whole(MOST_ROWS)} rows, more than two years of one-minute records; reading stopped at line ${line}. Bring one file for each year.`,
  });
}

function tellLongRows(progress: Progress, findings: FindingList): void {
  if (progress.longRows === 0) return;
  findings.add({
    code: 'field-count',
    severity: 'note',
    line: progress.firstLongLine,
    count: progress.longRows,
    message: () =>
      `${whole(progress.longRows)} rows have more than ${FULL_FIELDS} fields, first line ${progress.firstLongLine}; those beyond the ${FULL_FIELDS}th are ignored.`,
  });
}

/** A row that is shorter than the file's layout may have lost any of its fields, so its values are not trusted. */
function leaveOutDamagedRows({ counts, uniform }: FieldCounts, rows: SourceRows, findings: FindingList): void {
  if (uniform) return;
  const rowsWith = new Frequencies();
  for (let row = 0; row < counts.length; row++) rowsWith.add(counts[row] ?? 0);
  const usual = rowsWith.mostFrequent(0);
  for (let row = 0; row < counts.length; row++) {
    const count = counts[row] ?? 0;
    if (count >= usual || rowsWith.of(count) >= LAYOUT_SHARE * counts.length) continue;
    for (const column of [rows.dryBulbC, rows.dewPointC, rows.relativeHumidityPct, rows.pressurePa]) {
      column[row] = Number.NaN;
    }
    const line = rows.lines[row] ?? 0;
    findings.add({
      code: 'field-count',
      severity: 'doubt',
      line,
      message: () =>
        `Line ${line} has ${count} fields where the others have ${usual}: which one is lost cannot be told, so its values are left out.`,
    });
  }
}
