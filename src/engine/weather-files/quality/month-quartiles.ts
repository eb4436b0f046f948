import { MISSING_INT16 } from '../../conventions.ts';

/** Counting by tenths of a kelvin from -110 to 110 °C and beyond is enough for what no weather reaches. */
const LOW = -11_000;
const GRAIN = 10;
const BINS = 2_200;

export interface Quartiles {
  readonly lower: number;
  readonly median: number;
  readonly upper: number;
  /** The least and the greatest value. */
  readonly least: number;
  readonly most: number;
}

const counts = new Uint32Array(BINS);

/** Quartiles, to 0.1 K, of values in hundredths from `start` to the one before `end`; null when none is there. */
export function quartilesOf(values: Int16Array, start: number, end: number): Quartiles | null {
  counts.fill(0);
  let present = 0;
  let least = 32_767;
  let most = -32_767;
  for (let at = start; at < end; at++) {
    const value = values[at] ?? MISSING_INT16;
    if (value === MISSING_INT16) continue;
    present++;
    if (value < least) least = value;
    if (value > most) most = value;
    const bin = Math.max(0, Math.min(BINS - 1, Math.round((value - LOW) / GRAIN)));
    counts[bin] = (counts[bin] ?? 0) + 1;
  }
  if (present === 0) return null;
  let bin = 0;
  let below = 0;
  // The bin that holds the value with so many before it.
  const reach = (rank: number) => {
    while (below + (counts[bin] ?? 0) <= rank && bin < BINS - 1) {
      below += counts[bin] ?? 0;
      bin++;
    }
    return LOW + bin * GRAIN;
  };
  const lower = reach(Math.floor(present / 4));
  const median = reach(Math.floor(present / 2));
  return { lower, median, upper: reach(Math.floor((3 * present) / 4)), least, most };
}
