/**
 * Bytes to text. Strict UTF-8 first, else Windows-1252; a byte order mark of UTF-8 or UTF-16 decides by itself. Both
 * encodings agree with ASCII, so readers scan bytes and turn only names and comments into strings.
 */
import { type LineIndex, surveyText, type TextSurvey } from './survey-text.ts';

export interface DecodedText {
  /** UTF-8 or Windows-1252 bytes without a byte order mark. */
  readonly bytes: Uint8Array;
  readonly windows1252: boolean;
  /** The file was UTF-16 and has been rewritten as UTF-8. */
  readonly utf16: boolean;
  /** Where the lines end; null when some line ends are a carriage return alone. */
  readonly lines: LineIndex | null;
}

export interface NotText {
  readonly notText: 'gzip' | 'zip' | 'nul' | 'control';
  /** Line on which the first NUL stands, or null. */
  readonly line: number | null;
  /** Share of control characters, %. */
  readonly controlPct: number;
}

const MOST_CONTROL_PCT = 1;

/** Decodes a file, or says why it is not text. */
export function decodeText(file: Uint8Array): DecodedText | NotText {
  const archive = archiveKind(file);
  if (archive !== null) return { notText: archive, line: null, controlPct: 0 };
  const utf16 = utf16Order(file);
  const bytes = utf16 === null ? withoutUtf8Mark(file) : utf8FromUtf16(file.subarray(2), utf16);
  const found = surveyText(bytes);
  const refusal = notText(found, bytes);
  if (refusal !== null) return refusal;
  const windows1252 = found.firstBeyondAscii >= 0 && !isUtf8(bytes, found);
  return { bytes, windows1252, utf16: utf16 !== null, lines: found.loneReturns ? null : found.lines };
}

function archiveKind(file: Uint8Array): 'gzip' | 'zip' | null {
  if (file[0] === 0x1f && file[1] === 0x8b) return 'gzip';
  const zip = file[0] === 0x50 && file[1] === 0x4b && (file[2] === 3 || file[2] === 5 || file[2] === 7);
  return zip ? 'zip' : null;
}

function withoutUtf8Mark(file: Uint8Array): Uint8Array {
  return file[0] === 0xef && file[1] === 0xbb && file[2] === 0xbf ? file.subarray(3) : file;
}

function utf16Order(file: Uint8Array): 'little' | 'big' | null {
  if (file[0] === 0xff && file[1] === 0xfe) return 'little';
  if (file[0] === 0xfe && file[1] === 0xff) return 'big';
  return null;
}

function notText(found: TextSurvey, bytes: Uint8Array): NotText | null {
  if (found.nulLine !== null) return { notText: 'nul', line: found.nulLine, controlPct: 0 };
  const controlPct = (100 * found.controls) / Math.max(1, bytes.length);
  return controlPct > MOST_CONTROL_PCT ? { notText: 'control', line: null, controlPct } : null;
}

/** Length of the UTF-8 sequence at a place, 0 when it is malformed (overlong, a surrogate, beyond U+10FFFF, cut short). */
function sequenceLength(bytes: Uint8Array, at: number): number {
  const first = bytes[at] ?? 0;
  if (first < 0x80) return 1;
  const length =
    first >= 0xc2 && first <= 0xdf ? 2 : first >= 0xe0 && first <= 0xef ? 3 : first >= 0xf0 && first <= 0xf4 ? 4 : 0;
  for (let next = 1; next < length; next++) if (((bytes[at + next] ?? 0) & 0xc0) !== 0x80) return 0;
  const second = bytes[at + 1] ?? 0;
  const outside =
    (first === 0xe0 && second < 0xa0) ||
    (first === 0xed && second > 0x9f) ||
    (first === 0xf0 && second < 0x90) ||
    (first === 0xf4 && second > 0x8f);
  return outside ? 0 : length;
}

function isUtf8(bytes: Uint8Array, { firstBeyondAscii, lastBeyondAscii }: TextSurvey): boolean {
  for (let at = firstBeyondAscii; at <= lastBeyondAscii; ) {
    const length = (bytes[at] ?? 0) < 0x80 ? 1 : sequenceLength(bytes, at);
    if (length === 0) return false;
    at += length;
  }
  return true;
}

/** Characters of Windows-1252 at 0x80 to 0x9F; the five that it leaves undefined stay as they are. */
const WINDOWS_1252 = '€\u0081‚ƒ„…†‡ˆ‰Š‹Œ\u008dŽ\u008f\u0090‘’“”•–—˜™š›œ\u009džŸ';

/** So many bytes are handed to one call as its arguments. */
const LONGEST_CALL = 4_096;

/** The text between two byte positions of a decoded file. */
export function textBetween(text: DecodedText, start: number, end: number): string {
  const plainEnd = endOfAscii(text.bytes, start, Math.min(end, start + LONGEST_CALL));
  let out: string = Reflect.apply(String.fromCharCode, null, text.bytes.subarray(start, plainEnd));
  for (let at = plainEnd; at < end; ) {
    const byte = text.bytes[at] ?? 0;
    if (byte < 0x80 || text.windows1252) {
      out += byte >= 0x80 && byte < 0xa0 ? (WINDOWS_1252[byte - 0x80] ?? '') : String.fromCharCode(byte);
      at += 1;
      continue;
    }
    const length = Math.max(1, sequenceLength(text.bytes, at));
    out += at + length <= end ? codePoint(text.bytes, at, length) : '\ufffd';
    at += length;
  }
  return out;
}

/** Where ASCII ends. */
function endOfAscii(bytes: Uint8Array, start: number, end: number): number {
  let at = start;
  while (at < end && (bytes[at] ?? 0) < 0x80) at++;
  return at;
}

function codePoint(bytes: Uint8Array, at: number, length: number): string {
  let value = (bytes[at] ?? 0) & (0xff >> (length + 1));
  for (let next = 1; next < length; next++) value = (value << 6) | ((bytes[at + next] ?? 0) & 0x3f);
  return String.fromCodePoint(value);
}

function utf8FromUtf16(units: Uint8Array, order: 'little' | 'big'): Uint8Array {
  const view = new DataView(units.buffer, units.byteOffset, units.byteLength);
  const out = new Uint8Array(Math.floor(units.length / 2) * 3);
  let used = 0;
  for (let at = 0; at + 1 < units.length; at += 2) {
    let value = view.getUint16(at, order === 'little');
    const next = at + 3 < units.length ? view.getUint16(at + 2, order === 'little') : 0;
    if (value >= 0xd800 && value <= 0xdbff && next >= 0xdc00 && next <= 0xdfff) {
      value = 0x10000 + ((value - 0xd800) << 10) + (next - 0xdc00);
      at += 2;
    } else if (value >= 0xd800 && value <= 0xdfff) {
      value = 0xfffd;
    }
    used = writeUtf8(out, used, value);
  }
  return out.subarray(0, used);
}

function writeUtf8(out: Uint8Array, at: number, value: number): number {
  if (value < 0x80) {
    out[at] = value;
    return at + 1;
  }
  const tail = value < 0x800 ? 1 : value < 0x10000 ? 2 : 3;
  out[at] = ((0xff << (7 - tail)) & 0xff) | (value >> (6 * tail));
  for (let next = 1; next <= tail; next++) out[at + next] = 0x80 | ((value >> (6 * (tail - next))) & 0x3f);
  return at + tail + 1;
}
