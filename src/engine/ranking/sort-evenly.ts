/** Buckets for each number, and how many numbers in one are worth a sort of their own. */
const BUCKETS_PER_NUMBER = 2;
const MANY = 24;

/**
 * A sort of so many numbers, ascending, for use again and again: they are dealt into buckets of equal width, so that numbers
 * spread at all evenly (scores are) stand nearly in order at once, and each bucket is sorted by insertion. A crowded bucket is
 * sorted as any array is, so that the worst distribution costs one ordinary sort more.
 * @returns writes the numbers of `keys` into `sorted`, both of that length; `keys` stays as it is
 */
export function sortEvenly(length: number): (keys: Float64Array, sorted: Float64Array) => void {
  const buckets = BUCKETS_PER_NUMBER * length;
  const ends = new Int32Array(buckets + 1);
  const bucketOf = new Int32Array(length);
  return (keys, sorted) => {
    let lowest = Number.POSITIVE_INFINITY;
    let highest = Number.NEGATIVE_INFINITY;
    for (let at = 0; at < length; at++) {
      const key = keys[at] ?? 0;
      if (key < lowest) lowest = key;
      if (key > highest) highest = key;
    }
    // A little less than all buckets: rounding must not deal the highest one further.
    const perKey = highest > lowest ? (buckets - 1) / (highest - lowest) : 0;
    ends.fill(0);
    for (let at = 0; at < length; at++) {
      const bucket = (((keys[at] ?? 0) - lowest) * perKey) | 0;
      bucketOf[at] = bucket;
      ends[bucket] = (ends[bucket] ?? 0) + 1;
    }
    for (let bucket = 0, end = 0; bucket < buckets; bucket++) ends[bucket] = end += ends[bucket] ?? 0;
    for (let at = length - 1; at >= 0; at--) {
      const bucket = bucketOf[at] ?? 0;
      const place = (ends[bucket] ?? 0) - 1;
      ends[bucket] = place;
      sorted[place] = keys[at] ?? 0;
    }
    // Dealt out, the ends have become the beginnings.
    ends[buckets] = length;
    sortCrowded(sorted, ends);
    insertAll(sorted);
  };
}

function sortCrowded(sorted: Float64Array, begins: Int32Array): void {
  for (let bucket = 1; bucket < begins.length; bucket++) {
    const begin = begins[bucket - 1] ?? 0;
    const end = begins[bucket] ?? 0;
    if (end - begin > MANY) sorted.subarray(begin, end).sort();
  }
}

function insertAll(sorted: Float64Array): void {
  for (let at = 1; at < sorted.length; at++) {
    const key = sorted[at] ?? 0;
    let place = at;
    while (place > 0 && (sorted[place - 1] ?? 0) > key) {
      sorted[place] = sorted[place - 1] ?? 0;
      place--;
    }
    sorted[place] = key;
  }
}
