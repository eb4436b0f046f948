import { MISSING_INT16 } from '../../conventions.ts';

/** Counting by tenths of a kelvin is enough for what no weather reaches. */
const GRAIN = 10;
const counts = new Uint32Array(Math.ceil(65_536 / GRAIN) + 1);

export interface Quartiles {
  readonly lower: number;
  readonly median: number;
  readonly upper: number;
}

/** The least and the greatest of some values in hundredths from `start` to the one before `end`; null when none is there. */
export function extremesOf(values: Int16Array, start: number, end: number): { least: number; most: number } | null {
  let least = 32_767;
  let most = MISSING_INT16;
  for (let at = start; at < end; at++) {
    const value = values[at] ?? MISSING_INT16;
    if (value === MISSING_INT16) continue;
    if (value < least) least = value;
    if (value > most) most = value;
  }
  return most === MISSING_INT16 ? null : { least, most };
}

/** Quartiles, to 0.1 K, of values in hundredths from `start` to the one before `end`; null when none is there. */
export function quartilesOf(values: Int16Array, start: number, end: number): Quartiles | null {
  const extremes = extremesOf(values, start, end);
  if (extremes === null) return null;
  const { least, most } = extremes;
  const bins = Math.floor((most - least) / GRAIN) + 1;
  counts.fill(0, 0, bins);
  let present = 0;
  for (let at = start; at < end; at++) {
    const value = values[at] ?? MISSING_INT16;
    if (value === MISSING_INT16) continue;
    present++;
    const bin = ((value - least) / GRAIN) | 0;
    counts[bin] = (counts[bin] ?? 0) + 1;
  }
  const at = (rank: number) => least + GRAIN * binOfRank(rank, bins);
  return { lower: at(present >> 2), median: at(present >> 1), upper: at((3 * present) >> 2) };
}

/** The bin that holds the value with so many before it. */
function binOfRank(rank: number, bins: number): number {
  let below = 0;
  for (let bin = 0; bin < bins; bin++) {
    below += counts[bin] ?? 0;
    if (below > rank) return bin;
  }
  return bins - 1;
}
