const MOST_INT32 = 2 ** 31 - 1;

/** How often each whole number of a range occurs. */
export interface ValueCounts {
  /** Values counted. */
  readonly known: number;
  /** The least of them, to which the first count belongs. */
  readonly least: number;
  readonly table: Int32Array;
}

/**
 * Counts the whole numbers of a column: places in order follow from the counts without sorting. Made for values within some
 * thousands of each other, as hundredths of a kelvin are.
 * @param values whole numbers
 * @param from lesser values and companions stand for unknown ones, and neither of the two is counted
 * @param companions whole numbers beside the values
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
  const table = new Int32Array(known === 0 ? 0 : most - least + 1);
  for (let at = 0; at < values.length; at++) {
    const value = values[at] ?? 0;
    if (value < from || (companions[at] ?? 0) < from) continue;
    const bin = value - least;
    table[bin] = (table[bin] ?? 0) + 1;
  }
  return { known, least, table };
}

/** The values at some places, counted from 0 downwards; the places in ascending order. */
export function valuesDownwards({ least, table }: ValueCounts, places: readonly number[]): readonly number[] {
  let bin = table.length - 1;
  let upTo = table[bin] ?? 0;
  return places.map((place) => {
    while (upTo <= place && bin > 0) {
      bin--;
      upTo += table[bin] ?? 0;
    }
    return least + bin;
  });
}
