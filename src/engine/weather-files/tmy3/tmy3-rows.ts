import { RowCollector } from '../assembly/row-collector.ts';
import { type SourceRows, VALUE } from '../assembly/source-rows.ts';
import type { FindingList } from '../finding-list.ts';
import { isEstimatedLetter, isTellingLetter } from '../source-letters.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import { BLANK, numberField, quoted } from '../text/number-field.ts';
import { columnOfField, findSeparatedFields, type SeparatedFields, separatedText } from '../text/separated-fields.ts';
import { wrongDatePart } from '../time/wrong-date-part.ts';
import type { Tmy3Columns } from './tmy3-columns.ts';

const COMMA = 0x2c;
const DATE = /^(\d{1,2})\/(\d{1,2})\/(\d{4})$/;
const TIME = /^(\d{1,2}):(\d{2})(?::00)?$/;
const LONGEST_WORD = 24;
const MISSING_WORDS = new Set(['na', 'nan', '-', 'n/a', 'null']);
/** -9900 is the format's code; the others stand in look-alikes. */
const LOWEST_TEMPERATURE_C = -98;
const HIGHEST_TEMPERATURE_C = 99.9;

interface Progress {
  readonly cursor: LineCursor;
  readonly fields: SeparatedFields;
  readonly columns: Tmy3Columns;
  readonly rows: RowCollector;
  /** Line of the first row that ends a day as 24:00, and as 00:00 of the next date. */
  first24: number;
  first00: number;
  telling: boolean;
}

/** Reads every row; every fault in it is told. */
export function readTmy3Rows(
  cursor: LineCursor,
  layout: { readonly columns: Tmy3Columns; readonly fields: SeparatedFields },
  findings: FindingList,
): { readonly rows: SourceRows; readonly flagsInformative: boolean | null } {
  const { columns, fields } = layout;
  const rows = new RowCollector();
  const progress: Progress = { cursor, fields, columns, rows, first24: 0, first00: 0, telling: false };
  const needed = 1 + Math.max(columns.date, columns.time, columns.dryBulb, columns.dewPoint, columns.relativeHumidity);
  while (cursor.next()) {
    findSeparatedFields(cursor, COMMA, fields);
    const cut = !cursor.closed && fields.count < columns.count;
    if (fields.count < needed || cut) tellShort(progress, needed, findings);
    else readRow(progress, findings);
  }
  if (progress.first24 > 0 && progress.first00 > 0) tellMixture(progress, findings);
  const hasSources = columns.dryBulbSource >= 0;
  return { rows: rows.finish(), flagsInformative: hasSources ? progress.telling : null };
}

function readRow(progress: Progress, findings: FindingList): void {
  const { columns, cursor, rows } = progress;
  const { line } = cursor;
  const time = timeOf(progress, findings);
  const values = {
    dryBulbC: temperature(readValue(progress, columns.dryBulb, findings)),
    dewPointC: temperature(readValue(progress, columns.dewPoint, findings)),
    relativeHumidityPct: readValue(progress, columns.relativeHumidity, findings),
    pressureHpa: readValue(progress, columns.pressure, findings),
  };
  if (time === null) return;
  const { dryBulbC, dewPointC, pressureHpa, relativeHumidityPct } = values;
  rows.add({
    line,
    ...time,
    dryBulbC,
    dewPointC,
    relativeHumidityPct: relativeHumidityPct < 0 || relativeHumidityPct >= 999 ? Number.NaN : relativeHumidityPct,
    pressurePa: pressureHpa <= 0 || pressureHpa >= 9999 ? Number.NaN : pressureHpa * 100,
    estimated:
      sourceBit(progress, columns.dryBulbSource, VALUE.dryBulb) |
      sourceBit(progress, columns.dewPointSource, VALUE.dewPoint) |
      sourceBit(progress, columns.relativeHumiditySource, VALUE.relativeHumidity),
  });
}

function sourceBit(progress: Progress, column: number, bit: number): number {
  const { cursor, fields } = progress;
  if (column < 0 || column >= fields.count || fields.starts[column] === fields.ends[column]) return 0;
  const letter = cursor.text.bytes[fields.starts[column] ?? 0];
  if (isTellingLetter(letter)) progress.telling = true;
  return isEstimatedLetter(letter) ? bit : 0;
}

function timeOf(progress: Progress, findings: FindingList) {
  const { columns, cursor, fields } = progress;
  const { line } = cursor;
  const dateText = separatedText(cursor, fields, columns.date, LONGEST_WORD);
  const timeText = separatedText(cursor, fields, columns.time, LONGEST_WORD);
  const date = DATE.exec(dateText);
  const clock = TIME.exec(timeText);
  if (date === null || clock === null) {
    const [column, word, form] =
      date === null ? [columns.date, dateText, 'MM/DD/YYYY'] : [columns.time, timeText, 'HH:MM'];
    findings.add({
      code: 'not-a-number',
      severity: 'refuse',
      line,
      column: () => columnOfField(cursor, fields, column),
      message: () => `Line ${line}: ${quoted(word)} is not written as ${form}. Mend the field.`,
    });
    return null;
  }
  const time = {
    year: Number(date[3]),
    month: Number(date[1]),
    day: Number(date[2]),
    hour: Number(clock[1]),
    minute: Number(clock[2]),
  };
  const wrong = wrongDatePart(time);
  if (wrong !== null) {
    findings.add({
      code: 'time-order',
      severity: 'refuse',
      line,
      message: () => `Line ${line}: ${wrong}, so the row has no place in the year. Mend the date.`,
    });
    return null;
  }
  if (time.hour === 24 && progress.first24 === 0) progress.first24 = line;
  if (time.hour === 0 && progress.first00 === 0) progress.first00 = line;
  return time;
}

function temperature(value: number): number {
  return value >= HIGHEST_TEMPERATURE_C || value < LOWEST_TEMPERATURE_C ? Number.NaN : value;
}

function readValue(progress: Progress, column: number, findings: FindingList): number {
  const { cursor, fields } = progress;
  if (column < 0 || column >= fields.count) return Number.NaN;
  const value = numberField(cursor.text, fields.starts[column] ?? 0, fields.ends[column] ?? 0);
  if (typeof value === 'number') return value;
  const word = separatedText(cursor, fields, column, LONGEST_WORD);
  if (value === BLANK || MISSING_WORDS.has(word.trim().toLowerCase())) return Number.NaN;
  const { line } = cursor;
  findings.add({
    code: 'not-a-number',
    severity: 'refuse',
    line,
    column: () => columnOfField(cursor, fields, column),
    message: () => `Line ${line}, field ${column + 1}: ${quoted(word)} is not a number. Mend the field.`,
  });
  return Number.NaN;
}

function tellShort(progress: Progress, needed: number, findings: FindingList): void {
  const { closed, line } = progress.cursor;
  const { count } = progress.fields;
  const has = `${count} ${count === 1 ? 'field' : 'fields'}`;
  findings.add({
    code: closed ? 'field-count' : 'truncated',
    severity: closed ? 'refuse' : 'repair',
    line,
    message: () =>
      closed
        ? `Line ${line} has ${has}, where the last needed column is the ${needed}th. Mend the line, or bring the file anew from its source.`
        : `Line ${line}, the last, is cut short: it has ${has} and no line end. It is left out. If more is missing, bring the file anew from its source.`,
  });
}

function tellMixture(progress: Progress, findings: FindingList): void {
  const { first00, first24 } = progress;
  findings.add({
    code: 'time-order',
    severity: 'refuse',
    line: Math.min(first00, first24),
    lastLine: Math.max(first00, first24),
    message: () =>
      `Days end as 24:00 (first on line ${first24}) and as 00:00 of the next date (first on line ${first00}). Which hour a row is cannot be told: write one of the two throughout.`,
  });
}
