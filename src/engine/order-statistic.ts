/** So many rounds without an end mean an order made to defeat the search, and sorting is the safe way. */
const MOST_ROUNDS = 64;

/**
 * The value at a place, counted from 0 upwards, of the values in order, without putting all of them in order (C. A. R. Hoare's
 * selection). Afterwards no value before the place is greater and none after it is smaller.
 * @param values no NaN among them; rearranged
 */
export function valueAtPlace(values: Float64Array, place: number): number {
  let low = 0;
  let high = values.length - 1;
  for (let round = 0; low < high; round++) {
    if (round === MOST_ROUNDS) {
      values.sort();
      break;
    }
    const pivot = middleOfThree(values[low] ?? 0, values[(low + high) >> 1] ?? 0, values[high] ?? 0);
    let left = low;
    let right = high;
    while (left <= right) {
      while ((values[left] ?? 0) < pivot) left++;
      while ((values[right] ?? 0) > pivot) right--;
      if (left > right) break;
      const moved = values[left] ?? 0;
      values[left] = values[right] ?? 0;
      values[right] = moved;
      left++;
      right--;
    }
    if (place <= right) high = right;
    else if (place >= left) low = left;
    else break;
  }
  return values[place] ?? Number.NaN;
}

function middleOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}

/** The median of values, of which none is NaN; they are rearranged. NaN without any. */
export function medianOf(values: Float64Array): number {
  const middle = values.length >> 1;
  const upper = valueAtPlace(values, middle);
  if (values.length % 2 === 1) return upper;
  let lower = Number.NEGATIVE_INFINITY;
  for (let place = 0; place < middle; place++) lower = Math.max(lower, values[place] ?? lower);
  return (upper + lower) / 2;
}
