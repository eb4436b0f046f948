import { RowCollector } from '../assembly/row-collector.ts';
import { type SourceRow, type SourceRows, VALUE } from '../assembly/source-rows.ts';
import { type FindingList, whole } from '../finding-list.ts';
import { Frequencies } from '../frequencies.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import { type FieldBounds, FULL_FIELDS, findFields, flagsOf, NEEDED_FIELDS, readTime, readValues } from './epw-row.ts';
import { PlainRowReader } from './plain-row.ts';

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
  readonly fieldCounts: number[];
  readonly bounds: FieldBounds;
  firstFlags: number | null;
  flagsVary: boolean;
  longRows: number;
  firstLongLine: number;
}

/** Reads every data record; every fault in it is told. */
export function readEpwRows(cursor: LineCursor, findings: FindingList): EpwRows {
  const progress: Progress = {
    rows: new RowCollector(),
    fieldCounts: [],
    bounds: { starts: new Int32Array(NEEDED_FIELDS + 2), count: 0 },
    firstFlags: null,
    flagsVary: false,
    longRows: 0,
    firstLongLine: 0,
  };
  const plain = new PlainRowReader(cursor.text.bytes);
  for (let records = 1; ; records++) {
    if (records <= MOST_ROWS && plain.read(cursor.ahead)) {
      cursor.pass(plain.end, plain.next);
      noteLength(progress, plain.fieldCount, cursor.line);
      keepRow(cursor, progress, plain);
      continue;
    }
    if (!cursor.next()) break;
    if (records > MOST_ROWS) {
      tellTooMany(cursor, findings);
      break;
    }
    findFields(cursor, progress.bounds);
    if (cutShort(cursor, progress)) tellTruncated(cursor, progress, findings);
    else readRow(cursor, progress, plain.row, findings);
  }
  tellLongRows(progress, findings);
  const rows = progress.rows.finish();
  leaveOutDamagedRows(progress.fieldCounts, rows, findings);
  // Flags that say the same of every row tell nothing of any of them.
  if (!progress.flagsVary) rows.estimated.fill(0);
  return { rows, flagsInformative: progress.flagsVary };
}

/** A last line without its end and with fewer fields than the others. */
function cutShort(cursor: LineCursor, progress: Progress): boolean {
  const usual = progress.fieldCounts.at(-1) ?? NEEDED_FIELDS;
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
  keepRow(cursor, progress, { row, fieldCount: bounds.count, flagsStart: start, flagsEnd: end });
}

function noteLength(progress: Progress, fieldCount: number, line: number): void {
  if (fieldCount <= FULL_FIELDS) return;
  progress.longRows++;
  if (progress.firstLongLine === 0) progress.firstLongLine = line;
}

type ReadRow = Pick<PlainRowReader, 'row' | 'fieldCount' | 'flagsStart' | 'flagsEnd'>;

function keepRow(cursor: LineCursor, progress: Progress, read: ReadRow): void {
  const { row } = read;
  row.line = cursor.line;
  row.estimated = readFlags(cursor.text.bytes, progress, read);
  progress.fieldCounts.push(Math.min(read.fieldCount, FULL_FIELDS));
  progress.rows.add(row);
}

/** Keeps whether the flags of dry bulb and dew point, letter and digit of each, vary, and answers which values they call estimated. */
function readFlags(bytes: Uint8Array, progress: Progress, { flagsStart, flagsEnd }: ReadRow): number {
  const dryLetter = byteBefore(flagsEnd, bytes, flagsStart);
  const dryDigit = byteBefore(flagsEnd, bytes, flagsStart + 1);
  const dewLetter = byteBefore(flagsEnd, bytes, flagsStart + 2);
  const dewDigit = byteBefore(flagsEnd, bytes, flagsStart + 3);
  const firstFour = ((dryLetter * 256 + dryDigit) * 256 + dewLetter) * 256 + dewDigit;
  if (progress.firstFlags === null) progress.firstFlags = firstFour;
  else if (progress.firstFlags !== firstFour) progress.flagsVary = true;
  let estimated = 0;
  if (isEstimated(dryLetter)) estimated |= VALUE.dryBulb;
  if (isEstimated(dewLetter)) estimated |= VALUE.dewPoint;
  if (isEstimated(byteBefore(flagsEnd, bytes, flagsStart + 4))) estimated |= VALUE.relativeHumidity;
  return estimated;
}

/** The byte at a place before the end of a field, else 0. */
function byteBefore(end: number, bytes: Uint8Array, at: number): number {
  return at < end ? (bytes[at] ?? 0) : 0;
}

/** Source letters of values that are interpolated (B, C) or modelled (E). */
function isEstimated(letter: number): boolean {
  return letter === 0x42 || letter === 0x43 || letter === 0x45;
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
function leaveOutDamagedRows(fieldCounts: readonly number[], rows: SourceRows, findings: FindingList): void {
  const rowsWith = new Frequencies();
  for (const count of fieldCounts) rowsWith.add(count);
  const usual = rowsWith.mostFrequent(0);
  if (rowsWith.size === 1) return;
  for (let row = 0; row < fieldCounts.length; row++) {
    const count = fieldCounts[row] ?? 0;
    if (count >= usual || rowsWith.of(count) >= LAYOUT_SHARE * fieldCounts.length) continue;
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
