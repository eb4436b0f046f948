/**
 * How often each whole number occurs in a column: places in order and means over a range follow from it without sorting. Made for
 * values within some thousands of each other, as hundredths of a kelvin are.
 */
export class ValueCounts {
  /** Values counted. */
  known = 0;
  readonly #least: number;
  readonly #counts: Int32Array;
  /** Sum of the companions of each value. */
  readonly #sums: Float64Array;

  /**
   * @param values whole numbers
   * @param from lesser values and companions stand for unknown ones, and neither of the two is counted
   * @param companions whole numbers beside the values, of which means are asked for
   */
  constructor(values: Int32Array, from: number, companions: Int32Array = values) {
    let least = Number.MAX_SAFE_INTEGER;
    let most = from;
    for (let at = 0; at < values.length; at++) {
      const value = values[at] ?? 0;
      if (value < from || (companions[at] ?? 0) < from) continue;
      if (value < least) least = value;
      if (value > most) most = value;
    }
    this.#least = least;
    const bins = Math.max(0, most - least + 1);
    const counts = new Int32Array(bins);
    const sums = new Float64Array(bins);
    for (let at = 0; at < values.length; at++) {
      const value = values[at] ?? 0;
      const companion = companions[at] ?? 0;
      if (value < from || companion < from) continue;
      const bin = value - least;
      counts[bin] = (counts[bin] ?? 0) + 1;
      sums[bin] = (sums[bin] ?? 0) + companion;
      this.known++;
    }
    this.#counts = counts;
    this.#sums = sums;
  }

  /** The values at some places, counted from 0 downwards; the places in ascending order. */
  downwards(places: readonly number[]): readonly number[] {
    let bin = this.#counts.length - 1;
    let upTo = this.#counts[bin] ?? 0;
    return places.map((place) => {
      while (upTo <= place && bin > 0) {
        bin--;
        upTo += this.#counts[bin] ?? 0;
      }
      return this.#least + bin;
    });
  }

  /** Mean companion of the values no further than so much from a value. */
  meanCompanion(value: number, within: number): number {
    const first = Math.max(0, value - within - this.#least);
    const last = Math.min(this.#counts.length - 1, value + within - this.#least);
    let count = 0;
    let sum = 0;
    for (let bin = first; bin <= last; bin++) {
      count += this.#counts[bin] ?? 0;
      sum += this.#sums[bin] ?? 0;
    }
    return sum / count;
  }
}
