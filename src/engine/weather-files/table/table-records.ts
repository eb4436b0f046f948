/** The rows of a table as they stand, by station, with every fault told. */
import { MOST_STATIONS, tellTooManyStations } from '../assembly/assemble-station-years.ts';
import { type FindingList, linesPhrase, whole } from '../finding-list.ts';
import type { DecodedText } from '../text/decode-text.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import { quoted } from '../text/number-field.ts';
import { columnOfField, type SeparatedFields, separatedText } from '../text/separated-fields.ts';
import { civilMinutes } from '../time/civil-minutes.ts';
import { timeReader } from './row-time.ts';
import { type RowValues, valuesReader } from './row-values.ts';
import type { TableLayout } from './table-layout.ts';
import type { TableMapping } from './table-mapping.ts';
import { isRow, scanTable } from './table-scan.ts';

/** Two leap years of one-minute records. */
const MOST_ROWS = 2 * 8784 * 60;
const LONGEST_STATION = 60;
/** Lines after the last row that may be words about the table; of those before it every one is a damaged row. */
const SHOWN = 200;

/** Columns of one station, in the order of the file; NaN where missing. */
export interface TableRecords {
  readonly lines: number[];
  /** Minutes since 1970 as written, on whichever clock; UTC where the stamp carries its offset. */
  readonly minutes: number[];
  readonly dryBulbC: number[];
  readonly dewPointC: number[];
  readonly relativeHumidityPct: number[];
  readonly wetBulbC: number[];
  /** As it stands in its column. */
  readonly pressurePa: number[];
}

interface PendingLine {
  readonly line: number;
  readonly fieldCount: number;
  readonly isRow: boolean;
  readonly text: string;
  readonly closed: boolean;
}

/** @returns the records by station, under an empty key when the table holds one; and the lines after the last row */
export function readRecords(
  text: DecodedText,
  table: { readonly layout: TableLayout; readonly mapping: TableMapping },
  findings: FindingList,
): { readonly stations: ReadonlyMap<string, TableRecords>; readonly after: readonly string[] } {
  const { layout, mapping } = table;
  const readTime = timeReader(mapping.time.columns, layout);
  const readValues = valuesReader(mapping, layout);
  const stationAt = mapping.station === null ? -1 : layout.names.indexOf(mapping.station);
  const stations = new Map<string, TableRecords>();
  const pending: PendingLine[] = [];
  let rows = 0;
  let beyond = false;
  scanTable(text, layout, (cursor, fields) => {
    const holds = isRow(cursor, fields, layout);
    const stamp = holds ? readTime(cursor, fields) : null;
    if (stamp === null || rows >= MOST_ROWS) {
      if (rows >= MOST_ROWS) rows++;
      else pending.push(pendingLine(cursor, fields, holds));
      return;
    }
    tellDamaged(pending.splice(0), layout, findings);
    rows++;
    const key = stationAt < 0 ? '' : separatedText(cursor, fields, stationAt, LONGEST_STATION).trim();
    if (stations.size >= MOST_STATIONS && !stations.has(key)) {
      beyond = true;
      return;
    }
    const values = readValues(cursor, fields, (index) => tellNotANumber(cursor, fields, { index, layout }, findings));
    const minutes = civilMinutes(stamp.time) - (stamp.offsetMin ?? 0);
    keep(recordsOf(stations, key), { line: cursor.line, minutes }, values);
  });
  if (rows > MOST_ROWS) tellTooMany(findings);
  if (beyond) tellTooManyStations(findings);
  tellAfter(pending, findings);
  return { stations, after: pending.map((line) => line.text) };
}

function recordsOf(stations: Map<string, TableRecords>, key: string): TableRecords {
  const known = stations.get(key);
  if (known !== undefined) return known;
  const records: TableRecords = {
    lines: [],
    minutes: [],
    dryBulbC: [],
    dewPointC: [],
    relativeHumidityPct: [],
    wetBulbC: [],
    pressurePa: [],
  };
  stations.set(key, records);
  return records;
}

function keep(records: TableRecords, at: { line: number; minutes: number }, values: RowValues): void {
  records.lines.push(at.line);
  records.minutes.push(at.minutes);
  records.dryBulbC.push(values.dryBulbC);
  records.dewPointC.push(values.dewPointC);
  records.relativeHumidityPct.push(values.relativeHumidityPct);
  records.wetBulbC.push(values.wetBulbC);
  records.pressurePa.push(values.pressurePa);
}

function pendingLine(cursor: LineCursor, fields: SeparatedFields, holds: boolean): PendingLine {
  return {
    line: cursor.line,
    fieldCount: fields.count,
    isRow: holds,
    text: cursor.string(SHOWN),
    closed: cursor.closed,
  };
}

/** Lines between rows that are none: each is a fault with its line. */
function tellDamaged(lines: readonly PendingLine[], layout: TableLayout, findings: FindingList): void {
  for (const { fieldCount, isRow: holds, line, text } of lines) {
    findings.add({
      code: holds ? 'not-a-number' : 'field-count',
      severity: 'refuse',
      line,
      message: () =>
        holds
          ? `Line ${line} holds no time where the others have one: it begins with ${quoted(text)}. Mend the line.`
          : `Line ${line} has ${fieldCount} ${fieldCount === 1 ? 'field' : 'fields'}, where the table has ${layout.fieldCount}. Mend the line, or bring the file anew from its source.`,
    });
  }
}

/** Lines after the last row: words about the table; a last one without its end is cut short. */
function tellAfter(lines: readonly PendingLine[], findings: FindingList): void {
  const [first] = lines;
  const last = lines.at(-1);
  if (first === undefined || last === undefined) return;
  if (lines.length === 1 && !first.closed) {
    findings.add({
      code: 'truncated',
      severity: 'repair',
      line: first.line,
      message: () =>
        `Line ${first.line}, the last, is cut short: it has ${first.fieldCount} ${first.fieldCount === 1 ? 'field' : 'fields'} and no line end. It is left out. If more is missing, bring the file anew from its source.`,
    });
    return;
  }
  const dataLike = lines.filter(({ isRow: holds }) => holds).length;
  findings.add({
    code: 'field-count',
    severity: dataLike > 0 ? 'doubt' : 'note',
    line: first.line,
    lastLine: last.line,
    count: lines.length,
    message: () =>
      dataLike > 0
        ? `${linesPhrase(first.line, last.line)} after the table are left out, though ${whole(dataLike)} of them have its number of fields: their times cannot be read.`
        : `${linesPhrase(first.line, last.line)} after the table ${lines.length === 1 ? 'is no row and is' : 'are no rows and are'} left out.`,
  });
}

function tellTooMany(findings: FindingList): void {
  findings.add({
    code: 'row-count',
    severity: 'refuse',
    message: () =>
      `The file has more than ${whole(MOST_ROWS)} rows, more than two years of one-minute records. Bring one file for each year.`,
  });
}

function tellNotANumber(
  cursor: LineCursor,
  fields: SeparatedFields,
  at: { readonly index: number; readonly layout: TableLayout },
  findings: FindingList,
): void {
  const { line } = cursor;
  const { index, layout } = at;
  findings.add({
    code: 'not-a-number',
    severity: 'refuse',
    line,
    column: () => columnOfField(cursor, fields, index),
    message: () =>
      `Line ${line}, column ${quoted(layout.names[index] ?? '')}: ${quoted(separatedText(cursor, fields, index))} is not a number. Mend the field.`,
  });
}
