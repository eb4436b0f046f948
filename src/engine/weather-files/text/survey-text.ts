const TAB = 0x09;
const LINE_FEED = 0x0a;
const FORM_FEED = 0x0c;
const RETURN = 0x0d;
const CTRL_Z = 0x1a;
const SPACE = 0x20;
const DELETE = 0x7f;

/** Bytes that are looked at together, four in each of four words. */
const BLOCK = 16;
/** One in every byte of a word, blanks in every byte, and the highest bit of every byte. */
const ONES = 0x01010101;
const SPACES = 0x20202020;
const HIGHEST_BITS = 0x80808080;

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
}

/**
 * One pass over the bytes of a file: what is not text, and where bytes beyond ASCII and whether lone carriage returns stand there.
 * Blocks of printable ASCII, which weather files are made of, are passed over whole; only the others are looked at byte by byte.
 */
export function surveyText(bytes: Uint8Array): TextSurvey {
  const words = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const blocksEnd = bytes.length - (bytes.length % BLOCK);
  const found = { nulLine: null, controls: 0, firstBeyondAscii: -1, lastBeyondAscii: -1, loneReturns: false };
  let line = 1;
  let at = 0;
  while (at < bytes.length) {
    while (at < blocksEnd && isPrintable(words, at)) at += BLOCK;
    const end = Math.min(at + BLOCK, bytes.length);
    for (; at < end; at++) {
      const byte = bytes[at] ?? 0;
      if (byte >= SPACE && byte < DELETE) continue;
      if (byte === LINE_FEED) line++;
      else if (byte > DELETE) {
        if (found.firstBeyondAscii < 0) found.firstBeyondAscii = at;
        found.lastBeyondAscii = at;
      } else if (byte === RETURN) found.loneReturns ||= bytes[at + 1] !== LINE_FEED;
      else if (byte === 0) return { ...found, nulLine: line };
      else if (byte !== TAB && byte !== FORM_FEED && byte !== CTRL_Z) found.controls++;
    }
  }
  return found;
}

/** Whether a block holds blanks and printable ASCII alone: no byte with its highest bit, none below a blank, no Delete. */
function isPrintable(words: DataView, at: number): boolean {
  // The order of the bytes in a word does not matter here; this one is that of most machines.
  const a = words.getInt32(at, true);
  const b = words.getInt32(at + 4, true);
  const c = words.getInt32(at + 8, true);
  const d = words.getInt32(at + 12, true);
  // Adding one to Delete sets the highest bit, and so does taking a blank from what lies below it.
  const beyond = a | (a + ONES) | b | (b + ONES) | c | (c + ONES) | d | (d + ONES);
  const below = (a - SPACES) | (b - SPACES) | (c - SPACES) | (d - SPACES);
  return ((beyond | below) & HIGHEST_BITS) === 0;
}
