const MOST_INT32 = 2 ** 31 - 1;

/** How often each whole number of a range occurs, and the sum of what stands beside them. */
export interface ValueCounts {
  /** Values counted. */
  readonly known: number;
  /** The least of them, to which the first count belongs. */
  readonly least: number;
  /** Count and sum of each number, side by side, so that one look fetches both. */
  readonly table: Int32Array;
}

/**
 * Counts the whole numbers of a column: places in order and means over a range follow from the counts without sorting. Made for
 * values within some thousands of each other, as hundredths of a kelvin are; the sums of their companions must fit 32 bits.
 * @param values whole numbers
 * @param from lesser values and companions stand for unknown ones, and neither of the two is counted
 * @param companions whole numbers beside the values, of which means are asked for
 */
export function countValues(values: Int32Array, from: number, companions: Int32Array = values): ValueCounts {
  let least = MOST_INT32;
  let most = from;
  let known = 0;
  for (let at = 0; at < values.length; at++) {
    const value = values[at] ?? 0;
    if (value < from || (companions[at] ?? 0) < from) continue;
    known++;
    if (value < least) least = value;
    if (value > most) most = value;
  }
  const table = new Int32Array(known === 0 ? 0 : 2 * (most - least + 1));
  for (let at = 0; at < values.length; at++) {
    const value = values[at] ?? 0;
    const companion = companions[at] ?? 0;
    if (value < from || companion < from) continue;
    const bin = 2 * (value - least);
    table[bin] = (table[bin] ?? 0) + 1;
    table[bin + 1] = (table[bin + 1] ?? 0) + companion;
  }
  return { known, least, table };
}

/** The values at some places, counted from 0 downwards; the places in ascending order. */
export function valuesDownwards({ least, table }: ValueCounts, places: readonly number[]): readonly number[] {
  let bin = table.length / 2 - 1;
  let upTo = table[2 * bin] ?? 0;
  return places.map((place) => {
    while (upTo <= place && bin > 0) {
      bin--;
      upTo += table[2 * bin] ?? 0;
    }
    return least + bin;
  });
}

/** Mean companion of the values no further than so much from a value. */
export function meanCompanion({ least, table }: ValueCounts, value: number, within: number): number {
  const first = Math.max(0, value - within - least);
  const last = Math.min(table.length / 2 - 1, value + within - least);
  let count = 0;
  let sum = 0;
  for (let bin = first; bin <= last; bin++) {
    count += table[2 * bin] ?? 0;
    sum += table[2 * bin + 1] ?? 0;
  }
  return sum / count;
}
