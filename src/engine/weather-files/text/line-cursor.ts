import { type DecodedText, textBetween } from './decode-text.ts';

const LINE_FEED = 0x0a;
const RETURN = 0x0d;
const SPACE = 0x20;

/** Walks a file line by line: LF, CRLF, CR or any mixture. Blank lines are counted and skipped. */
export class LineCursor {
  readonly text: DecodedText;
  /** Physical line, counted from 1. */
  line = 0;
  /** First byte of the line, and the byte after its last. */
  start = 0;
  end = 0;
  /** Whether a line end follows; the last line of a file cut short has none. */
  closed = true;
  #next = 0;
  #again = false;

  constructor(text: DecodedText) {
    this.text = text;
  }

  /** Moves to the next line that is not blank; false at the end of the file. */
  next(): boolean {
    if (this.#again) {
      this.#again = false;
      return true;
    }
    while (this.#next < this.text.bytes.length) {
      this.#step();
      if (!this.#blank()) return true;
    }
    return false;
  }

  /** First byte of the line that `next` would look at. */
  get ahead(): number {
    return this.#again ? this.start : this.#next;
  }

  /** How many lines stand before that one. */
  get linesBefore(): number {
    return this.#again ? this.line - 1 : this.line;
  }

  /** Moves over so many lines, for a reader that has read them by itself; the last of them is then the present one. */
  pass(lines: number): void {
    if (lines === 0 || this.text.lines === null) return;
    const { ends } = this.text.lines;
    this.line = this.linesBefore + lines;
    this.#again = false;
    this.start = (ends[this.line - 2] ?? -1) + 1;
    this.#endAt(ends[this.line - 1] ?? -1);
  }

  /** Makes the next call of `next` return this line once more. */
  putBack(): void {
    this.#again = true;
  }

  /** The line as a string, at most `limit` bytes of it. */
  string(limit: number): string {
    return textBetween(this.text, this.start, Math.min(this.end, this.start + limit));
  }

  #step(): void {
    const { bytes, lines } = this.text;
    this.start = this.#next;
    const at = lines === null ? lineEnd(bytes, this.start) : (lines.ends[this.line] ?? -1);
    this.#endAt(at);
    this.line++;
  }

  /** Ends the line at a line feed or a carriage return, or, at -1, with the text. */
  #endAt(at: number): void {
    const { bytes } = this.text;
    this.closed = at >= 0;
    this.end = this.closed ? at : bytes.length;
    this.#next = this.end + 1;
    if (bytes[this.end] === RETURN && bytes[this.#next] === LINE_FEED) this.#next++;
    else if (bytes[this.end - 1] === RETURN && this.end > this.start) this.end--;
  }

  #blank(): boolean {
    const { bytes } = this.text;
    for (let at = this.start; at < this.end; at++) {
      // Spaces, tabs and a closing Ctrl-Z make no line.
      if ((bytes[at] ?? 0) > SPACE) return false;
    }
    return true;
  }
}

/** The next line feed or carriage return, or -1. */
function lineEnd(bytes: Uint8Array, start: number): number {
  let at = start;
  while (at < bytes.length && bytes[at] !== LINE_FEED && bytes[at] !== RETURN) at++;
  return at < bytes.length ? at : -1;
}
