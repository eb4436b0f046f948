const TAB = 0x09;
const LINE_FEED = 0x0a;
const FORM_FEED = 0x0c;
const RETURN = 0x0d;
const CTRL_Z = 0x1a;
const SPACE = 0x20;
const COMMA = 0x2c;
const DELETE = 0x7f;

/** Bytes that are looked at together, four in each of four words. */
const BLOCK = 16;
const WORD = 4;
/** The same in every byte of a word: one, a blank, a comma, all bits but the highest, the highest bit. */
const ONES = 0x01010101;
const SPACES = 0x20202020;
const COMMAS = 0x2c2c2c2c;
const LOWER_BITS = 0x7f7f7f7f;
const HIGHEST_BITS = 0x80808080;

/** Where the lines of a text end, in its order. */
export interface LineIndex {
  /** Place of each line feed. */
  readonly ends: Int32Array;
  /** How many commas stand on the line before it. */
  readonly commas: Int32Array;
}

export interface TextSurvey {
  /** Line of the first NUL, null without any; nothing after it has been looked at. */
  readonly nulLine: number | null;
  /** Control characters other than line ends, tabs, form feeds and Ctrl-Z. */
  readonly controls: number;
  /** Places of the first and the last byte beyond ASCII, -1 without any. */
  readonly firstBeyondAscii: number;
  readonly lastBeyondAscii: number;
  /** Some carriage return has no line feed after it. */
  readonly loneReturns: boolean;
  readonly lines: LineIndex;
}

/** A year of hours and the header of most formats fit at once. */
const USUAL_LINES = 8_900;

/**
 * One pass over the bytes of a file: what is not text, where bytes beyond ASCII and whether lone carriage returns stand there, where
 * the lines end and how many commas they hold, which readers would have to look for in a pass of their own.
 * Blocks of printable ASCII, which weather files are made of, are passed over whole; only what stands between them is looked at byte
 * by byte. One function, since this loop goes over every byte of every file.
 */
export function surveyText(bytes: Uint8Array): TextSurvey {
  // The order of the bytes in a word does not matter here; this one is that of most machines.
  const words = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const { length } = bytes;
  const found = { nulLine: null, controls: 0, firstBeyondAscii: -1, lastBeyondAscii: -1, loneReturns: false };
  const lines = new LineRoom();
  let commas = 0;
  let at = 0;
  while (at < length) {
    for (; at <= length - BLOCK; at += BLOCK) {
      const a = words.getInt32(at, true);
      const b = words.getInt32(at + 4, true);
      const c = words.getInt32(at + 8, true);
      const d = words.getInt32(at + 12, true);
      if ((strange(a) | strange(b) | strange(c) | strange(d)) & HIGHEST_BITS) break;
      commas += BLOCK - (Math.imul(apart(a) + apart(b) + apart(c) + apart(d), ONES) >>> 24);
    }
    for (; at <= length - WORD; at += WORD) {
      const word = words.getInt32(at, true);
      if (strange(word) & HIGHEST_BITS) break;
      commas += WORD - (Math.imul(apart(word), ONES) >>> 24);
    }
    let byte = bytes[at] ?? 0;
    for (; at < length && byte >= SPACE && byte < DELETE; byte = bytes[at] ?? 0) {
      if (byte === COMMA) commas++;
      at++;
    }
    if (at === length) break;
    if (byte === LINE_FEED) {
      lines.add(at, commas);
      commas = 0;
    } else if (byte > DELETE) {
      if (found.firstBeyondAscii < 0) found.firstBeyondAscii = at;
      found.lastBeyondAscii = at;
    } else if (byte === RETURN) found.loneReturns ||= bytes[at + 1] !== LINE_FEED;
    else if (byte === 0) return { ...found, nulLine: lines.count + 1, lines: lines.index() };
    else if (byte !== TAB && byte !== FORM_FEED && byte !== CTRL_Z) found.controls++;
    at++;
  }
  return { ...found, lines: lines.index() };
}

/** A word with the highest bit of some byte set unless it holds blanks and printable ASCII alone. */
function strange(word: number): number {
  // Adding one to Delete sets the highest bit, and so does taking a blank from what lies below it.
  return word | (word + ONES) | (word - SPACES);
}

/** One for each of four bytes of ASCII that is no comma, each in its own byte. */
function apart(word: number): number {
  return (((word ^ COMMAS) + LOWER_BITS) >>> 7) & ONES;
}

/** Takes the lines of a text one by one. */
class LineRoom {
  count = 0;
  #ends = new Int32Array(USUAL_LINES);
  #commas = new Int32Array(USUAL_LINES);

  add(end: number, commas: number): void {
    if (this.count === this.#ends.length) {
      this.#ends = twiceAsLong(this.#ends);
      this.#commas = twiceAsLong(this.#commas);
    }
    this.#ends[this.count] = end;
    this.#commas[this.count] = commas;
    this.count++;
  }

  index(): LineIndex {
    return { ends: this.#ends.subarray(0, this.count), commas: this.#commas.subarray(0, this.count) };
  }
}

function twiceAsLong(column: Int32Array): Int32Array<ArrayBuffer> {
  const longer = new Int32Array(2 * column.length);
  longer.set(column);
  return longer;
}
