/** One data record of an EPW: the ten fields that are needed, by position. */
import { daysInMonth, monthNames } from '../../reduction/calendar.ts';
import type { SourceRow } from '../assembly/source-rows.ts';
import type { FindingList } from '../finding-list.ts';
import { textBetween } from '../text/decode-text.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import { BLANK, numberField, quoted } from '../text/number-field.ts';
import { humidityWithoutCodes, pressureWithoutCodes, temperatureWithoutCodes } from './missing-codes.ts';

const COMMA = 0x2c;
export const NEEDED_FIELDS = 10;
export const FULL_FIELDS = 35;

const FIELD_NAMES = [
  'year',
  'month',
  'day',
  'hour',
  'minute',
  'source flags',
  'dry bulb',
  'dew point',
  'relative humidity',
  'pressure',
];
const YEAR = 0;
const MONTH = 1;
const DAY = 2;
const HOUR = 3;
const MINUTE = 4;
const FLAGS = 5;
const DRY_BULB = 6;
const DEW_POINT = 7;
const RELATIVE_HUMIDITY = 8;
const PRESSURE = 9;

/** Words that stand for a missing value. */
const MISSING_WORDS = new Set(['na', 'nan', '-', 'n/a', 'null']);
const LONGEST_MISSING_FIELD = 12;
/** A number beyond this is no year. */
const LAST_YEAR = 999_999_999;

/** Where the fields of the present line begin; the next begins one byte after the comma. */
export interface FieldBounds {
  readonly starts: Int32Array;
  count: number;
}

/** Finds the first ten fields of the line and counts all of them. */
export function findFields(cursor: LineCursor, bounds: FieldBounds): void {
  const { bytes } = cursor.text;
  bounds.starts[0] = cursor.start;
  let count = 1;
  for (let at = cursor.start; at < cursor.end; at++) {
    if (bytes[at] !== COMMA) continue;
    if (count <= NEEDED_FIELDS) bounds.starts[count] = at + 1;
    count++;
  }
  if (count <= NEEDED_FIELDS) bounds.starts[count] = cursor.end + 1;
  bounds.count = count;
}

/** Reads the time of the line into a row; false when it cannot be placed, with every fault told. */
export function readTime(cursor: LineCursor, bounds: FieldBounds, row: SourceRow, findings: FindingList): boolean {
  const year = numberField(cursor.text, startOf(bounds, YEAR), endOf(bounds, YEAR));
  const month = timePart(cursor, bounds, MONTH, findings);
  const day = timePart(cursor, bounds, DAY, findings);
  const hour = timePart(cursor, bounds, HOUR, findings);
  const minute = timePart(cursor, bounds, MINUTE, findings);
  if (Number.isNaN(month + day + hour + minute)) return false;
  const wrong =
    wrongPart('month', month, 1, 12) ??
    wrongPart('day', day, 1, daysInMonth(month, true)) ??
    wrongPart('hour', hour, 0, 24) ??
    wrongPart('minute', minute, 0, 60);
  if (wrong !== null) {
    tellWrongTime(cursor, bounds, { ...wrong, month }, findings);
    return false;
  }
  row.year = typeof year === 'number' && Number.isInteger(year) && Math.abs(year) <= LAST_YEAR ? year : 0;
  row.month = month;
  row.day = day;
  row.hour = hour;
  row.minute = minute;
  return true;
}

function timePart(cursor: LineCursor, bounds: FieldBounds, index: number, findings: FindingList): number {
  const value = numberField(cursor.text, startOf(bounds, index), endOf(bounds, index));
  if (typeof value === 'number') return value;
  tellNotANumber(cursor, bounds, index, findings);
  return Number.NaN;
}

interface WrongPart {
  readonly part: string;
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

function tellWrongTime(
  cursor: LineCursor,
  bounds: FieldBounds,
  wrong: WrongPart & { readonly month: number },
  findings: FindingList,
): void {
  const { line } = cursor;
  const ofMonth = wrong.part === 'day' ? ` of ${monthNames[wrong.month - 1]}` : '';
  findings.add({
    code: 'time-order',
    severity: 'refuse',
    line,
    column: () => columnOf(cursor, bounds, FIELD_NAMES.indexOf(wrong.part)),
    message: () =>
      `Line ${line}: ${wrong.part} ${wrong.value}${ofMonth} does not exist (${wrong.low} to ${wrong.high}), so the row has no place in the year. Mend the date.`,
  });
}

function wrongPart(part: string, value: number, low: number, high: number): WrongPart | null {
  return Number.isInteger(value) && value >= low && value <= high ? null : { part, value, low, high };
}

/** Reads the four values of the line into a row; NaN for what is missing. Letters are told. */
export function readValues(cursor: LineCursor, bounds: FieldBounds, row: SourceRow, findings: FindingList): void {
  row.relativeHumidityPct = humidityWithoutCodes(readValue(cursor, bounds, RELATIVE_HUMIDITY, findings));
  row.pressurePa = pressureWithoutCodes(readValue(cursor, bounds, PRESSURE, findings));
  row.dryBulbC = temperatureWithoutCodes(readValue(cursor, bounds, DRY_BULB, findings));
  row.dewPointC = temperatureWithoutCodes(readValue(cursor, bounds, DEW_POINT, findings));
}

function readValue(cursor: LineCursor, bounds: FieldBounds, index: number, findings: FindingList): number {
  const value = numberField(cursor.text, startOf(bounds, index), endOf(bounds, index));
  if (typeof value === 'number') return value;
  if (value === BLANK) return Number.NaN;
  if (!saysMissing(cursor, bounds, index)) tellNotANumber(cursor, bounds, index, findings);
  return Number.NaN;
}

function saysMissing(cursor: LineCursor, bounds: FieldBounds, index: number): boolean {
  const short = endOf(bounds, index) - startOf(bounds, index) <= LONGEST_MISSING_FIELD;
  return short && MISSING_WORDS.has(fieldText(cursor, bounds, index).trim().toLowerCase());
}

/** Where the source flags of the line begin, and the byte after them. */
export function flagsOf(bounds: FieldBounds): { start: number; end: number } {
  return { start: startOf(bounds, FLAGS), end: endOf(bounds, FLAGS) };
}

function tellNotANumber(cursor: LineCursor, bounds: FieldBounds, index: number, findings: FindingList): void {
  const { line } = cursor;
  findings.add({
    code: 'not-a-number',
    severity: 'refuse',
    line,
    column: () => columnOf(cursor, bounds, index),
    message: () =>
      `Line ${line}, field ${index + 1} (${FIELD_NAMES[index]}), character ${columnOf(cursor, bounds, index)}: ${describe(fieldText(cursor, bounds, index))} is not a number. Mend the field.`,
  });
}

function describe(field: string): string {
  return field.trim() === '' ? 'an empty field' : quoted(field);
}

function fieldText(cursor: LineCursor, bounds: FieldBounds, index: number): string {
  const start = startOf(bounds, index);
  return textBetween(cursor.text, start, Math.min(endOf(bounds, index), start + 80));
}

/** Character position of a field on its line, counted from 1. */
function columnOf(cursor: LineCursor, bounds: FieldBounds, index: number): number {
  return textBetween(cursor.text, cursor.start, startOf(bounds, index)).length + 1;
}

function startOf(bounds: FieldBounds, index: number): number {
  return bounds.starts[index] ?? 0;
}

function endOf(bounds: FieldBounds, index: number): number {
  return (bounds.starts[index + 1] ?? 1) - 1;
}
