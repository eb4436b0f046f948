import { daysInMonth } from '../../reduction/calendar.ts';
import type { SourceRow } from '../assembly/source-rows.ts';
import { humidityWithoutCodes, pressureWithoutCodes, temperatureWithoutCodes } from './missing-codes.ts';

const LINE_FEED = 0x0a;
const RETURN = 0x0d;
const SPACE = 0x20;
const COMMA = 0x2c;
const MINUS = 0x2d;
const POINT = 0x2e;
const ZERO = 0x30;

/** Bytes that are looked at together, four in each of four words. */
const BLOCK = 16;
const WORD = 4;
/** The same in every byte of a word: one, a blank, a comma, all bits but the highest, the highest bit. */
const ONES = 0x01010101;
const SPACES = 0x20202020;
const COMMAS = 0x2c2c2c2c;
const LOWER_BITS = 0x7f7f7f7f;
const HIGHEST_BITS = 0x80808080;

/** As many digits as a small integer of the machine holds; a power of ten so small is exact, and one division rounds once. */
const MOST_DIGITS = 9;
const POWERS_OF_TEN = [1, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9];
/** The field after the ten that are read. */
const NEXT_FIELD = 11;

/**
 * Reads a data record as nearly all are written, in one pass over its bytes: numbers without blanks, exponents or plus signs, a
 * date that exists, more fields than the ten that are needed, a line end. Whatever is not so plain is left to `epw-row.ts`, which
 * gives the same values for a plain row and tells what is wrong with another.
 */
export class PlainRowReader {
  /** What the last row held; its line and its estimated values are the caller's to set. */
  readonly row: SourceRow = {
    line: 0,
    year: 0,
    month: 0,
    day: 0,
    hour: 0,
    minute: 0,
    dryBulbC: Number.NaN,
    dewPointC: Number.NaN,
    relativeHumidityPct: Number.NaN,
    pressurePa: Number.NaN,
    estimated: 0,
  };
  fieldCount = 0;
  /** Where the source flags begin, and the byte after them. */
  flagsStart = 0;
  flagsEnd = 0;
  /** The byte after the last of the line, and the first of the line after it. */
  end = 0;
  next = 0;

  readonly #bytes: Uint8Array;
  readonly #words: DataView;
  /** Year, month, day, hour and minute. */
  readonly #times = new Int32Array(5);
  /** Dry bulb, dew point, relative humidity and pressure as they stand. */
  readonly #values = new Float64Array(4);

  constructor(bytes: Uint8Array) {
    this.#bytes = bytes;
    this.#words = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  }

  /** Reads the line that begins at a byte; false when it is not plain, and then nothing of it counts. */
  read(start: number): boolean {
    const flags = this.#readTimes(start);
    if (flags < 0) return false;
    this.flagsStart = flags;
    this.flagsEnd = this.#commaFrom(flags);
    if (this.flagsEnd < 0) return false;
    const rest = this.#readValues(this.flagsEnd + 1);
    return rest >= 0 && this.#countFields(rest);
  }

  /** Reads whole numbers of digits alone, each with the comma after it. Answers where they end, -1 when they are not so. */
  #readTimes(start: number): number {
    const bytes = this.#bytes;
    const times = this.#times;
    let at = start;
    for (let place = 0; place < times.length; place++) {
      const first = at;
      let value = 0;
      let digit = (bytes[at] ?? 0) - ZERO;
      for (; digit >= 0 && digit <= 9 && at < first + MOST_DIGITS; digit = (bytes[at] ?? 0) - ZERO) {
        value = value * 10 + digit;
        at++;
      }
      if (at === first || bytes[at] !== COMMA) return -1;
      times[place] = value;
      at++;
    }
    return this.#takeTimes() ? at : -1;
  }

  /** Whether the calendar has such an hour, in a leap year at least. */
  #takeTimes(): boolean {
    const { row } = this;
    const times = this.#times;
    const month = times[1] ?? 0;
    const day = times[2] ?? 0;
    const hour = times[3] ?? 0;
    const minute = times[4] ?? 0;
    row.year = times[0] ?? 0;
    row.month = month;
    row.day = day;
    row.hour = hour;
    row.minute = minute;
    return day >= 1 && day <= daysInMonth(month, true) && hour <= 24 && minute <= 60;
  }

  /** Reads numbers with their decimals, each with the comma after it, NaN for an empty field; answers as `#readTimes` does. */
  #readValues(start: number): number {
    const bytes = this.#bytes;
    const values = this.#values;
    let at = start;
    for (let place = 0; place < values.length; place++) {
      const negative = bytes[at] === MINUS;
      if (negative) at++;
      const first = at;
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
      if (bytes[at] !== COMMA || digits > MOST_DIGITS || (digits === 0 && !empty)) return -1;
      const value = point < 0 ? mantissa : mantissa / (POWERS_OF_TEN[at - point - 1] ?? 1);
      values[place] = empty ? Number.NaN : negative ? -value : value;
      at++;
    }
    this.#takeValues();
    return at;
  }

  #takeValues(): void {
    const { row } = this;
    const values = this.#values;
    row.dryBulbC = temperatureWithoutCodes(values[0] ?? 0);
    row.dewPointC = temperatureWithoutCodes(values[1] ?? 0);
    row.relativeHumidityPct = humidityWithoutCodes(values[2] ?? 0);
    row.pressurePa = pressureWithoutCodes(values[3] ?? 0);
  }

  /** The first comma from a byte on; -1 when a control character comes before it. */
  #commaFrom(start: number): number {
    const bytes = this.#bytes;
    const words = this.#words;
    const lastWord = bytes.length - WORD;
    let at = start;
    for (; at <= lastWord; at += WORD) {
      const word = words.getInt32(at, true);
      const apart = word ^ COMMAS;
      // A byte of zero borrows, and so does one below a blank: the word holds a comma or perhaps a control character.
      if ((((apart - ONES) & ~apart) | ((word - SPACES) & ~word)) & HIGHEST_BITS) break;
    }
    while ((bytes[at] ?? 0) >= SPACE && bytes[at] !== COMMA) at++;
    return bytes[at] === COMMA ? at : -1;
  }

  /** Counts the fields up to the line end; false without one. */
  #countFields(start: number): boolean {
    const bytes = this.#bytes;
    const words = this.#words;
    const lastBlock = bytes.length - BLOCK;
    let fields = NEXT_FIELD;
    let at = start;
    while (at < bytes.length) {
      for (; at <= lastBlock; at += BLOCK) {
        const a = words.getInt32(at, true);
        const b = words.getInt32(at + 4, true);
        const c = words.getInt32(at + 8, true);
        const d = words.getInt32(at + 12, true);
        // A line end lies below a blank; what lies beyond ASCII would disturb the count.
        const strange = a | (a - SPACES) | b | (b - SPACES) | c | (c - SPACES) | d | (d - SPACES);
        if (strange & HIGHEST_BITS) break;
        fields += BLOCK - bytesApart(a, b, c, d);
      }
      const end = Math.min(at + BLOCK, bytes.length);
      for (; at < end; at++) {
        const byte = bytes[at];
        if (byte === COMMA) fields++;
        else if (byte === LINE_FEED) return this.#endLine(fields, at);
        else if (byte === RETURN && bytes[at + 1] !== LINE_FEED) return false;
      }
    }
    return false;
  }

  #endLine(fields: number, at: number): true {
    this.fieldCount = fields;
    this.end = this.#bytes[at - 1] === RETURN ? at - 1 : at;
    this.next = at + 1;
    return true;
  }
}

/** How many of sixteen bytes of ASCII are no comma: each sets the highest bit of its own byte, and these are added up. */
function bytesApart(a: number, b: number, c: number, d: number): number {
  const bits =
    ((((a ^ COMMAS) + LOWER_BITS) >>> 7) & ONES) +
    ((((b ^ COMMAS) + LOWER_BITS) >>> 7) & ONES) +
    ((((c ^ COMMAS) + LOWER_BITS) >>> 7) & ONES) +
    ((((d ^ COMMAS) + LOWER_BITS) >>> 7) & ONES);
  return Math.imul(bits, ONES) >>> 24;
}
