import { daysInMonth } from '../../reduction/calendar.ts';
import type { RowCollector } from '../assembly/row-collector.ts';
import type { SourceRows } from '../assembly/source-rows.ts';
import type { LineIndex } from '../text/survey-text.ts';
import { humidityWithoutCodes, pressureWithoutCodes, temperatureWithoutCodes } from './missing-codes.ts';
import type { SourceFlags } from './source-flags.ts';

const COMMA = 0x2c;
const MINUS = 0x2d;
const POINT = 0x2e;
const ZERO = 0x30;

/** Bytes that are looked at together, four in each of four words. */
const WORD = 4;
const BLOCK = 16;
/** The same in every byte of a word: one, a comma, the highest bit. */
const ONES = 0x01010101;
const COMMAS = 0x2c2c2c2c;
const HIGHEST_BITS = 0x80808080;

/** As many digits as a small integer of the machine holds; a power of ten so small is exact, and one division rounds once. */
const MOST_DIGITS = 9;
const POWERS_OF_TEN = [1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9];
/** A part of a date or time stands above the count of its bytes, the comma among them, since two numbers would be an object. */
const MOST_PART_DIGITS = 4;
const LENGTH_BITS = 4;
const LENGTH = (1 << LENGTH_BITS) - 1;
const FIRST_OF_MONTH = 1 << LENGTH_BITS;
const HOURS_END = 25 << LENGTH_BITS;
const MINUTES_END = 61 << LENGTH_BITS;
/** Commas after the ten fields that are read, and how many of these are values. */
const FEWEST_COMMAS = 10;
const VALUES = 4;
/** Bytes of a year, a month and a day, their commas among them, that three words can be compared over. */
const SHORTEST_DATE = 8;
const LONGEST_DATE = 12;

/**
 * Reads data records as nearly all are written, from the bytes of their first ten fields: numbers without blanks, exponents or plus
 * signs, a date that exists, more fields than the ten that are needed, a line end. Whatever is not so plain is left to `epw-row.ts`,
 * which gives the same values for a plain row and tells what is wrong with another.
 */
export class PlainRowReader {
  readonly #bytes: Uint8Array;
  readonly #words: DataView;
  readonly #index: LineIndex;
  /** The date of the last row, where it begins and how many bytes it has, 0 before the first. */
  #year = 0;
  #month = 0;
  #day = 0;
  #dateStart = 0;
  #dateLength = 0;
  /** Where the flags of each row read begin and end. */
  #flagStarts = new Int32Array(0);
  #flagEnds = new Int32Array(0);

  constructor(bytes: Uint8Array, index: LineIndex) {
    this.#bytes = bytes;
    this.#words = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    this.#index = index;
  }

  /**
   * Reads rows up to the first that is not plain, or until the columns are full.
   * @param from where the first of them begins, how many lines stand before it, and how many are to be read at most
   * @returns how many have been read
   */
  readInto(rows: RowCollector, from: { start: number; line: number; most: number }, flags: SourceFlags): number {
    const { columns, count } = rows;
    if (this.#flagStarts.length < columns.lines.length) {
      this.#flagStarts = new Int32Array(columns.lines.length);
      this.#flagEnds = new Int32Array(columns.lines.length);
    }
    const end = this.#readFields(columns, { ...from, row: count });
    takeFlags(columns.estimated, flags, { starts: this.#flagStarts, ends: this.#flagEnds, row: count, end });
    leaveOutCodes(columns, count, end);
    return end - count;
  }

  /**
   * The fields as they stand. Long, since the machine's compiler takes only so much into one loop from other functions, and this one
   * goes over every hour of every file: what each row needs stands here, and the rest is called or done afterwards.
   * @returns the row after the last that has been read
   */
  #readFields(columns: SourceRows, from: { start: number; line: number; most: number; row: number }): number {
    const bytes = this.#bytes;
    const words = this.#words;
    const { commas, ends } = this.#index;
    const { days, dewPointC, dryBulbC, hours, lines, minutes, months, pressurePa, years } = columns;
    const { relativeHumidityPct } = columns;
    const flagStarts = this.#flagStarts;
    const flagEnds = this.#flagEnds;
    const values = new Float64Array(VALUES);
    const lastRow = Math.min(lines.length, from.row + from.most);
    const lastStart = bytes.length - BLOCK;
    let { line, row, start } = from;
    for (; row < lastRow && start <= lastStart && (commas[line] ?? 0) >= FEWEST_COMMAS; row++) {
      let length = this.#dateLength;
      const before = this.#dateStart;
      // 23 of 24 rows have the date of the one before.
      const same =
        length > 0 &&
        words.getInt32(start, true) === words.getInt32(before, true) &&
        words.getInt32(start + WORD, true) === words.getInt32(before + WORD, true) &&
        words.getInt32(start + length - WORD, true) === words.getInt32(before + length - WORD, true);
      if (!same) length = this.#readDate(start);
      if (length < 0) break;
      const hour = partAt(bytes, start + length);
      const minute = partAt(bytes, start + length + (hour & LENGTH));
      if (hour < 0 || hour >= HOURS_END || minute < 0 || minute >= MINUTES_END) break;
      let at = start + length + (hour & LENGTH) + (minute & LENGTH);
      flagStarts[row] = at;
      for (; at <= lastStart; at += BLOCK) {
        const a = words.getInt32(at, true) ^ COMMAS;
        const b = words.getInt32(at + WORD, true) ^ COMMAS;
        const c = words.getInt32(at + 2 * WORD, true) ^ COMMAS;
        const d = words.getInt32(at + 3 * WORD, true) ^ COMMAS;
        // A byte of zero borrows, which shows in the highest bit of it.
        if ((((a - ONES) & ~a) | ((b - ONES) & ~b) | ((c - ONES) & ~c) | ((d - ONES) & ~d)) & HIGHEST_BITS) break;
      }
      while (bytes[at] !== COMMA) at++;
      flagEnds[row] = at;
      let read = 0;
      for (; read < VALUES; read++) {
        at++;
        let byte = bytes[at] ?? 0;
        const negative = byte === MINUS;
        if (negative) byte = bytes[++at] ?? 0;
        const first = at;
        const end = first + MOST_DIGITS + 1;
        let mantissa = 0;
        let point = -1;
        for (; at < end; byte = bytes[++at] ?? 0) {
          const digit = byte - ZERO;
          if (digit >= 0 && digit <= 9) mantissa = mantissa * 10 + digit;
          else if (byte === POINT && point < 0) point = at;
          else break;
        }
        const digits = at - first - (point < 0 ? 0 : 1);
        if (byte !== COMMA || digits > MOST_DIGITS || (digits === 0 && (negative || point >= 0))) break;
        const value = point < 0 ? mantissa : mantissa / (POWERS_OF_TEN[at - point - 1] ?? 1);
        values[read] = digits === 0 ? Number.NaN : negative ? -value : value;
      }
      if (read < VALUES) break;
      years[row] = this.#year;
      months[row] = this.#month;
      days[row] = this.#day;
      hours[row] = hour >> LENGTH_BITS;
      minutes[row] = minute >> LENGTH_BITS;
      dryBulbC[row] = values[0] ?? 0;
      dewPointC[row] = values[1] ?? 0;
      relativeHumidityPct[row] = values[2] ?? 0;
      pressurePa[row] = values[VALUES - 1] ?? 0;
      start = (ends[line] ?? 0) + 1;
      line++;
      lines[row] = line;
    }
    return row;
  }

  /** Reads year, month and day. @returns how many bytes they have; -1 when no calendar has them, leap years among them */
  #readDate(start: number): number {
    const bytes = this.#bytes;
    const year = partAt(bytes, start);
    const month = partAt(bytes, start + (year & LENGTH));
    const day = partAt(bytes, start + (year & LENGTH) + (month & LENGTH));
    if (year < 0 || month < 0 || day < FIRST_OF_MONTH) return -1;
    if (day >> LENGTH_BITS > daysInMonth(month >> LENGTH_BITS, true)) return -1;
    const length = (year & LENGTH) + (month & LENGTH) + (day & LENGTH);
    this.#year = year >> LENGTH_BITS;
    this.#month = month >> LENGTH_BITS;
    this.#day = day >> LENGTH_BITS;
    this.#dateStart = start;
    this.#dateLength = length >= SHORTEST_DATE && length <= LONGEST_DATE ? length : 0;
    return length;
  }
}

function takeFlags(
  estimated: Uint8Array,
  flags: SourceFlags,
  of: { starts: Int32Array; ends: Int32Array; row: number; end: number },
): void {
  const { end, ends, starts } = of;
  for (let row = of.row; row < end; row++) estimated[row] = flags.take(starts[row] ?? 0, ends[row] ?? 0);
}

function leaveOutCodes(columns: SourceRows, start: number, end: number): void {
  const { dewPointC, dryBulbC, pressurePa, relativeHumidityPct } = columns;
  for (let row = start; row < end; row++) {
    dryBulbC[row] = temperatureWithoutCodes(dryBulbC[row] ?? 0);
    dewPointC[row] = temperatureWithoutCodes(dewPointC[row] ?? 0);
    relativeHumidityPct[row] = humidityWithoutCodes(relativeHumidityPct[row] ?? 0);
    pressurePa[row] = pressureWithoutCodes(pressurePa[row] ?? 0);
  }
}

/** A whole number of up to four digits with the comma after it, above the count of its bytes; -1 when it is not so. */
function partAt(bytes: Uint8Array, start: number): number {
  let at = start;
  let value = 0;
  let digit = (bytes[at] ?? 0) - ZERO;
  for (; digit >= 0 && digit <= 9 && at < start + MOST_PART_DIGITS; digit = (bytes[++at] ?? 0) - ZERO) {
    value = value * 10 + digit;
  }
  return at === start || bytes[at] !== COMMA ? -1 : (value << LENGTH_BITS) | (at + 1 - start);
}
