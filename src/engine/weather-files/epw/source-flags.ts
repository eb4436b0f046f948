import { VALUE } from '../assembly/source-rows.ts';

/** Letter and digit of the dry bulb and of the dew point. */
const WORD = 4;

/** Reads the source flags of the rows of a file: a letter and a digit for each value. */
export class SourceFlags {
  /** Whether those of dry bulb and dew point vary through the file. */
  vary = false;
  readonly #bytes: Uint8Array;
  readonly #words: DataView;
  #first = 0;
  #any = false;
  /** Of the row before: the flags that are looked at, and what they say. */
  #lastFour = 0;
  #lastThird = -1;
  #lastEstimated = 0;

  constructor(bytes: Uint8Array) {
    this.#bytes = bytes;
    this.#words = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  }

  /** Takes the flags of a row, from a byte to the one before another, and answers which values they call estimated: bits of `VALUE`. */
  take(start: number, end: number): number {
    const firstFour = end >= start + WORD ? this.#words.getInt32(start, true) : this.#shortWord(start, end);
    if (!this.#any) {
      this.#any = true;
      this.#first = firstFour;
    } else if (this.#first !== firstFour) this.vary = true;
    const third = this.#byteBefore(end, start + WORD);
    // Most rows have the flags of the one before.
    if (firstFour === this.#lastFour && third === this.#lastThird) return this.#lastEstimated;
    let estimated = 0;
    if (isEstimated(firstFour & 0xff)) estimated |= VALUE.dryBulb;
    if (isEstimated((firstFour >> 16) & 0xff)) estimated |= VALUE.dewPoint;
    if (isEstimated(third)) estimated |= VALUE.relativeHumidity;
    this.#lastFour = firstFour;
    this.#lastThird = third;
    this.#lastEstimated = estimated;
    return estimated;
  }

  /** The first four bytes of a field that has fewer, zeros after them. */
  #shortWord(start: number, end: number): number {
    let word = 0;
    for (let at = start; at < end; at++) word |= (this.#bytes[at] ?? 0) << (8 * (at - start));
    return word;
  }

  /** The byte at a place before the end of a field, else 0. */
  #byteBefore(end: number, at: number): number {
    return at < end ? (this.#bytes[at] ?? 0) : 0;
  }
}

/** Source letters of values that are interpolated (B, C) or modelled (E). */
function isEstimated(letter: number): boolean {
  return letter === 0x42 || letter === 0x43 || letter === 0x45;
}
