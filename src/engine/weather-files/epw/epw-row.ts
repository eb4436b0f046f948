/** One data record of an EPW: the ten fields that are needed, by position. */
import { daysInMonth, monthNames } from '../../reduction/calendar.ts';
import type { FindingList } from '../finding-list.ts';
import { textBetween } from '../text/decode-text.ts';
import type { LineCursor } from '../text/line-cursor.ts';
import { BLANK, NOT_A_NUMBER, numberField, quoted } from '../text/number-field.ts';

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
const FLAGS = 5;
const DRY_BULB = 6;
const DEW_POINT = 7;
const RELATIVE_HUMIDITY = 8;
const PRESSURE = 9;

/** Words that stand for a missing value. */
const MISSING_WORDS = new Set(['na', 'nan', '-', 'n/a', 'null']);

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

export interface EpwTime {
  year: number;
  month: number;
  day: number;
  hour: number;
  minute: number;
}

/** The time of the row; null when it cannot be placed, with every fault told. */
export function readTime(cursor: LineCursor, bounds: FieldBounds, findings: FindingList): EpwTime | null {
  const number = (index: number) => numberField(cursor.text, startOf(bounds, index), endOf(bounds, index));
  const year = number(YEAR);
  const values = [1, 2, 3, 4].map((index) => {
    const value = number(index);
    if (typeof value === 'number') return value;
    tellNotANumber(cursor, bounds, index, findings);
    return Number.NaN;
  });
  const [month = Number.NaN, day = Number.NaN, hour = Number.NaN, minute = Number.NaN] = values;
  if (Number.isNaN(month + day + hour + minute)) return null;
  const wrong =
    wrongPart('month', month, 1, 12) ??
    wrongPart('day', day, 1, daysInMonth(month, true)) ??
    wrongPart('hour', hour, 0, 24) ??
    wrongPart('minute', minute, 0, 60);
  if (wrong !== null) {
    const { line } = cursor;
    const ofMonth = wrong.part === 'day' ? ` of ${monthNames[month - 1]}` : '';
    findings.add({
      code: 'time-order',
      severity: 'refuse',
      line,
      column: () => columnOf(cursor, bounds, FIELD_NAMES.indexOf(wrong.part)),
      message: () =>
        `Line ${line}: ${wrong.part} ${wrong.value}${ofMonth} does not exist (${wrong.low} to ${wrong.high}), so the row has no place in the year. Mend the date.`,
    });
    return null;
  }
  return { year: typeof year === 'number' && Number.isInteger(year) ? year : 0, month, day, hour, minute };
}

function wrongPart(
  part: string,
  value: number,
  low: number,
  high: number,
): { part: string; value: number; low: number; high: number } | null {
  return Number.isInteger(value) && value >= low && value <= high ? null : { part, value, low, high };
}

/** Dry bulb and dew point, °C, relative humidity, %, and pressure, Pa; NaN for a missing code. Letters are told. */
export function readValues(
  cursor: LineCursor,
  bounds: FieldBounds,
  findings: FindingList,
): { dryBulbC: number; dewPointC: number; relativeHumidityPct: number; pressurePa: number } {
  const temperature = (value: number) => (value >= 99.9 || TEMPERATURE_CODES.has(value) ? Number.NaN : value);
  const value = (index: number) => readValue(cursor, bounds, index, findings);
  const relativeHumidityPct = value(RELATIVE_HUMIDITY);
  const pressurePa = value(PRESSURE);
  return {
    dryBulbC: temperature(value(DRY_BULB)),
    dewPointC: temperature(value(DEW_POINT)),
    relativeHumidityPct: relativeHumidityPct >= 999 || relativeHumidityPct < 0 ? Number.NaN : relativeHumidityPct,
    // 99999 may be a pressure: the median of the file decides, in `read-epw.ts`.
    pressurePa: pressurePa >= 999_999 || pressurePa === 9_999 || pressurePa <= 0 ? Number.NaN : pressurePa,
  };
}

const TEMPERATURE_CODES = new Set([-99, -99.9, -999, -9999]);

function readValue(cursor: LineCursor, bounds: FieldBounds, index: number, findings: FindingList): number {
  const value = numberField(cursor.text, startOf(bounds, index), endOf(bounds, index));
  if (typeof value === 'number') return value;
  if (value === BLANK) return Number.NaN;
  const word = fieldText(cursor, bounds, index);
  if (value === NOT_A_NUMBER && !MISSING_WORDS.has(word.trim().toLowerCase())) {
    tellNotANumber(cursor, bounds, index, findings);
  }
  return Number.NaN;
}

/** First bytes of the source flags: letter and digit of dry bulb, dew point and relative humidity. */
export function flagBytes(cursor: LineCursor, bounds: FieldBounds): Uint8Array {
  const start = startOf(bounds, FLAGS);
  return cursor.text.bytes.subarray(start, Math.min(start + 6, endOf(bounds, FLAGS)));
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
