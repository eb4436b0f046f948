import { SLOTS_PER_LEAP_YEAR } from '../../conventions.ts';

/** How many fields each row of a file has, at most 255: a year of hours fits at once. */
export class FieldCounts {
  /** Whether all rows have as many fields as the first. */
  uniform = true;
  #counts = new Uint8Array(SLOTS_PER_LEAP_YEAR);
  #rows = 0;

  /** Of the rows so far. */
  get counts(): Uint8Array {
    return this.#counts.subarray(0, this.#rows);
  }

  /** Of the last row; undefined before the first. */
  get last(): number | undefined {
    return this.#rows === 0 ? undefined : this.#counts[this.#rows - 1];
  }

  add(fields: number): void {
    if (this.#rows === this.#counts.length) {
      const longer = new Uint8Array(2 * this.#counts.length);
      longer.set(this.#counts);
      this.#counts = longer;
    }
    this.#counts[this.#rows] = fields;
    this.#rows++;
    if (fields !== this.#counts[0]) this.uniform = false;
  }
}
