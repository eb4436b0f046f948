import { VALUE } from '../assembly/source-rows.ts';

/** Reads the source flags of the rows of a file: a letter and a digit for each value. */
export class SourceFlags {
  /** Whether those of dry bulb and dew point vary through the file. */
  vary = false;
  readonly #bytes: Uint8Array;
  #first = 0;
  #any = false;

  constructor(bytes: Uint8Array) {
    this.#bytes = bytes;
  }

  /** Takes the flags of a row, from a byte to the one before another, and answers which values they call estimated: bits of `VALUE`. */
  take(start: number, end: number): number {
    const dryLetter = this.#byteBefore(end, start);
    const dewLetter = this.#byteBefore(end, start + 2);
    const firstFour =
      (dryLetter << 24) |
      (this.#byteBefore(end, start + 1) << 16) |
      (dewLetter << 8) |
      this.#byteBefore(end, start + 3);
    if (!this.#any) {
      this.#any = true;
      this.#first = firstFour;
    } else if (this.#first !== firstFour) this.vary = true;
    let estimated = 0;
    if (isEstimated(dryLetter)) estimated |= VALUE.dryBulb;
    if (isEstimated(dewLetter)) estimated |= VALUE.dewPoint;
    if (isEstimated(this.#byteBefore(end, start + 4))) estimated |= VALUE.relativeHumidity;
    return estimated;
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
