import { emptyRows, type SourceRows, VALUE } from '../assembly/source-rows.ts';
import { type FindingList, whole } from '../finding-list.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import {
  type EpwTime,
  type FieldBounds,
  FULL_FIELDS,
  findFields,
  flagBytes,
  NEEDED_FIELDS,
  readTime,
  readValues,
} from './epw-row.ts';

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
  readonly rows: SourceRows;
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
    rows: emptyRows(),
    fieldCounts: [],
    bounds: { starts: new Int32Array(NEEDED_FIELDS + 2), count: 0 },
    firstFlags: null,
    flagsVary: false,
    longRows: 0,
    firstLongLine: 0,
  };
  let records = 0;
  while (cursor.next()) {
    records++;
    if (records > MOST_ROWS) {
      tellTooMany(cursor, findings);
      break;
    }
    findFields(cursor, progress.bounds);
    if (cutShort(cursor, progress)) tellTruncated(cursor, progress, findings);
    else readRow(cursor, progress, findings);
  }
  tellLongRows(progress, findings);
  leaveOutDamagedRows(progress, findings);
  // Flags that say the same of every row tell nothing of any of them.
  if (!progress.flagsVary) progress.rows.estimated.fill(0);
  return { rows: progress.rows, flagsInformative: progress.flagsVary };
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

function readRow(cursor: LineCursor, progress: Progress, findings: FindingList): void {
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
  if (bounds.count > FULL_FIELDS) {
    progress.longRows++;
    if (progress.firstLongLine === 0) progress.firstLongLine = line;
  }
  const time = readTime(cursor, bounds, findings);
  const values = readValues(cursor, bounds, findings);
  if (time === null) return;
  progress.fieldCounts.push(Math.min(bounds.count, FULL_FIELDS));
  keepRow(progress.rows, { line, time, values, estimated: readFlags(cursor, progress) });
}

function keepRow(
  rows: SourceRows,
  row: { line: number; time: EpwTime; values: ReturnType<typeof readValues>; estimated: number },
): void {
  rows.lines.push(row.line);
  rows.years.push(row.time.year);
  rows.months.push(row.time.month);
  rows.days.push(row.time.day);
  rows.hours.push(row.time.hour);
  rows.minutes.push(row.time.minute);
  rows.dryBulbC.push(row.values.dryBulbC);
  rows.dewPointC.push(row.values.dewPointC);
  rows.relativeHumidityPct.push(row.values.relativeHumidityPct);
  rows.pressurePa.push(row.values.pressurePa);
  rows.estimated.push(row.estimated);
}

/** Keeps whether the flags vary, and answers which values they call estimated. */
function readFlags(cursor: LineCursor, progress: Progress): number {
  const flags = flagBytes(cursor, progress.bounds);
  const [dryLetter = 0, dryDigit = 0, dewLetter = 0, dewDigit = 0, humidityLetter = 0] = flags;
  const firstFour = ((dryLetter * 256 + dryDigit) * 256 + dewLetter) * 256 + dewDigit;
  if (progress.firstFlags === null) progress.firstFlags = firstFour;
  else if (progress.firstFlags !== firstFour) progress.flagsVary = true;
  let estimated = 0;
  if (isEstimated(dryLetter)) estimated |= VALUE.dryBulb;
  if (isEstimated(dewLetter)) estimated |= VALUE.dewPoint;
  if (isEstimated(humidityLetter)) estimated |= VALUE.relativeHumidity;
  return estimated;
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
function leaveOutDamagedRows(progress: Progress, findings: FindingList): void {
  const { fieldCounts, rows } = progress;
  const rowsWith = new Map<number, number>();
  for (const count of fieldCounts) rowsWith.set(count, (rowsWith.get(count) ?? 0) + 1);
  const usual = [...rowsWith].reduce((most, entry) => (entry[1] > most[1] ? entry : most), [0, 0])[0];
  for (let row = 0; row < fieldCounts.length; row++) {
    const count = fieldCounts[row] ?? 0;
    if (count >= usual || (rowsWith.get(count) ?? 0) >= LAYOUT_SHARE * fieldCounts.length) continue;
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
