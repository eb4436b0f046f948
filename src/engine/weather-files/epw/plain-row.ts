import { daysInMonth } from '../../reduction/calendar.ts';
import type { RowCollector } from '../assembly/row-collector.ts';
import type { LineIndex } from '../text/survey-text.ts';
import { humidityWithoutCodes, pressureWithoutCodes, temperatureWithoutCodes } from './missing-codes.ts';
import type { SourceFlags } from './source-flags.ts';

const COMMA = 0x2c;
const MINUS = 0x2d;
const POINT = 0x2e;
const ZERO = 0x30;

/** Bytes that are looked at together, four in each of four words. */
const WORD = 4;
/** The same in every byte of a word: one, a comma, the highest bit. */
const ONES = 0x01010101;
const COMMAS = 0x2c2c2c2c;
const HIGHEST_BITS = 0x80808080;

/** As many digits as a small integer of the machine holds; a power of ten so small is exact, and one division rounds once. */
const MOST_DIGITS = 9;
const POWERS_OF_TEN = [1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9];
/** Commas after the ten fields that are read. */
const FEWEST_COMMAS = 10;
/** Bytes of a year, a month and a day, their commas among them, that three words can be compared over. */
const SHORTEST_DATE = 8;
const LONGEST_DATE = 12;
/** No field is looked at further than this beyond its beginning without a look at its bytes. */
const MARGIN = 16;

/**
 * Reads data records as nearly all are written, from the bytes of their first ten fields: numbers without blanks, exponents or plus
 * signs, a date that exists, more fields than the ten that are needed, a line end. Whatever is not so plain is left to `epw-row.ts`,
 * which gives the same values for a plain row and tells what is wrong with another.
 */
export class PlainRowReader {
  readonly #bytes: Uint8Array;
  readonly #words: DataView;
  readonly #index: LineIndex;
  /** Where the reading stands; -1 after what is not plain. */
  #at = 0;
  /** The date of the last row, where it begins and how many bytes it has, 0 before the first. */
  #year = 0;
  #month = 0;
  #day = 0;
  #dateStart = 0;
  #dateLength = 0;

  constructor(bytes: Uint8Array, index: LineIndex) {
    this.#bytes = bytes;
    this.#words = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    this.#index = index;
  }

  /**
   * Reads rows up to the first that is not plain, or until the columns are full. One loop over columns at hand, since it takes every
   * hour of every file.
   * @param from where the first of them begins, how many lines stand before it, and how many are to be read at most
   * @returns how many have been read
   */
  readInto(rows: RowCollector, from: { start: number; line: number; most: number }, flags: SourceFlags): number {
    const { commas, ends } = this.#index;
    const {
      days,
      dewPointC,
      dryBulbC,
      estimated,
      hours,
      lines,
      minutes,
      months,
      pressurePa,
      relativeHumidityPct,
      years,
    } = rows.columns;
    const last = Math.min(lines.length, rows.count + from.most);
    let { line, start } = from;
    let row = rows.count;
    for (; row < last && (commas[line] ?? 0) >= FEWEST_COMMAS; row++) {
      const end = ends[line] ?? 0;
      if (start + MARGIN > end || (!this.#passSameDate(start) && !this.#readDate(start))) break;
      const hour = this.#wholeNumber();
      const minute = this.#wholeNumber();
      if (hour < 0 || hour > 24 || minute < 0 || minute > 60) break;
      const flagsStart = this.#at;
      const flagsEnd = this.#commaFrom(flagsStart);
      this.#at = flagsEnd + 1;
      this.#readDecimal(dryBulbC, row);
      this.#readDecimal(dewPointC, row);
      this.#readDecimal(relativeHumidityPct, row);
      this.#readDecimal(pressurePa, row);
      if (this.#at < 0) break;
      line++;
      start = end + 1;
      lines[row] = line;
      years[row] = this.#year;
      months[row] = this.#month;
      days[row] = this.#day;
      hours[row] = hour;
      minutes[row] = minute;
      dryBulbC[row] = temperatureWithoutCodes(dryBulbC[row] ?? 0);
      dewPointC[row] = temperatureWithoutCodes(dewPointC[row] ?? 0);
      relativeHumidityPct[row] = humidityWithoutCodes(relativeHumidityPct[row] ?? 0);
      pressurePa[row] = pressureWithoutCodes(pressurePa[row] ?? 0);
      estimated[row] = flags.take(flagsStart, flagsEnd);
    }
    return row - rows.count;
  }

  /** Whether the line begins with the date of the last row, as 23 of 24 do; then it is passed. */
  #passSameDate(start: number): boolean {
    const words = this.#words;
    const before = this.#dateStart;
    const length = this.#dateLength;
    if (length === 0) return false;
    const last = length - WORD;
    const same =
      words.getInt32(start, true) === words.getInt32(before, true) &&
      words.getInt32(start + WORD, true) === words.getInt32(before + WORD, true) &&
      words.getInt32(start + last, true) === words.getInt32(before + last, true);
    if (same) this.#at = start + length;
    return same;
  }

  /** Reads year, month and day; false when no calendar has them, leap years among them. */
  #readDate(start: number): boolean {
    this.#at = start;
    this.#year = this.#wholeNumber();
    this.#month = this.#wholeNumber();
    this.#day = this.#wholeNumber();
    const length = this.#at - start;
    const exists = this.#year >= 0 && this.#day >= 1 && this.#day <= daysInMonth(this.#month, true);
    this.#dateStart = start;
    this.#dateLength = exists && length >= SHORTEST_DATE && length <= LONGEST_DATE ? length : 0;
    return exists;
  }

  /** Reads a whole number of digits alone with the comma after it; -1 when it is not so. */
  #wholeNumber(): number {
    const bytes = this.#bytes;
    const first = this.#at;
    let at = first;
    let value = 0;
    let digit = (bytes[at] ?? 0) - ZERO;
    for (; digit >= 0 && digit <= 9 && at < first + MOST_DIGITS; digit = (bytes[at] ?? 0) - ZERO) {
      value = value * 10 + digit;
      at++;
    }
    this.#at = at + 1;
    return at === first || bytes[at] !== COMMA ? -1 : value;
  }

  /**
   * Reads a number with its decimals and the comma after it into a place of a column, NaN for an empty field: given back, it would be
   * an object of its own. The two commonest shapes are told from one word: with a digit or two before the point and one after it.
   */
  #readDecimal(column: Float64Array, row: number): void {
    const start = this.#at;
    if (start < 0 || start > this.#words.byteLength - MARGIN) {
      this.#at = -1;
      return;
    }
    const negative = this.#bytes[start] === MINUS;
    const at = negative ? start + 1 : start;
    const word = this.#words.getInt32(at, true);
    // What differs from "00.0" and "0.0,": digits become their values, and adding six to one beyond nine shows in the upper half.
    const four = word ^ 0x302e3030;
    const three = word ^ 0x2c302e30;
    let tenths = 0;
    if (((four | (four + 0x06000606)) & 0xf0fff0f0) === 0 && this.#bytes[at + 4] === COMMA) {
      this.#at = at + 5;
      tenths = (four & 15) * 100 + ((four >> 8) & 15) * 10 + (four >> 24);
    } else if (((three | (three + 0x00060006)) & 0xfff0fff0) === 0) {
      this.#at = at + 4;
      tenths = (three & 15) * 10 + (three >> 16);
    } else {
      this.#readOther(at, negative, { column, row });
      return;
    }
    column[row] = (negative ? -tenths : tenths) / 10;
  }

  /** The same for a number of any shape, from its first digit on. */
  #readOther(first: number, negative: boolean, into: { column: Float64Array; row: number }): void {
    const bytes = this.#bytes;
    let at = first;
    let mantissa = 0;
    let point = -1;
    for (; at <= first + MOST_DIGITS; at++) {
      const byte = bytes[at] ?? 0;
      const digit = byte - ZERO;
      if (digit >= 0 && digit <= 9) mantissa = mantissa * 10 + digit;
      else if (byte === POINT && point < 0) point = at;
      else break;
    }
    const digits = at - first - (point < 0 ? 0 : 1);
    const empty = digits === 0 && !negative && point < 0;
    if (bytes[at] !== COMMA || digits > MOST_DIGITS || (digits === 0 && !empty)) {
      this.#at = -1;
      return;
    }
    this.#at = at + 1;
    const value = point < 0 ? mantissa : mantissa / (POWERS_OF_TEN[at - point - 1] ?? 1);
    into.column[into.row] = empty ? Number.NaN : negative ? -value : value;
  }

  /** The first comma from a byte on; one stands before the line end. */
  #commaFrom(start: number): number {
    const words = this.#words;
    const lastWord = words.byteLength - WORD;
    for (let at = start; at <= lastWord; at += WORD) {
      const apart = words.getInt32(at, true) ^ COMMAS;
      // A byte of zero borrows; the lowest that does is the first comma.
      const found = (apart - ONES) & ~apart & HIGHEST_BITS;
      if (found !== 0) return at + ((31 - Math.clz32(found & -found)) >> 3);
    }
    return this.#bytes.indexOf(COMMA, Math.max(start, lastWord));
  }
}
