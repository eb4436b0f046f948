/**
 * Counts the ranks of places over many draws. Each score goes, with the place's number, into one floating-point key (whole
 * steps of the score x a power of two + number), so that plain numbers in order give the whole order: no objects, no
 * comparing function. Places whose scores fall in the same step tie, and share the ranks that they fill.
 */
import { sortEvenly } from './sort-evenly.ts';

/** Steps of a score from 0 to 100: 2^40, or fewer when very many places need the bits of a key (2^53 are exact). */
const SCORE_BITS = 40;
const KEY_BITS = 52;
const HIGHEST_SCORE = 100;

export interface RankCounts {
  /** Draws at each rank: value at place x number of places + rank, both from 0; ties in equal parts. */
  readonly counts: Float64Array;
  /** Places of the last draw, best first. */
  readonly order: Int32Array;
  /** The last draw's scores in whole steps, by place: equal steps are a tie. */
  readonly steps: Float64Array;
  /** Counts one draw. @param scores 0..100, by place */
  readonly add: (scores: Float64Array) => void;
}

export function rankCounts(places: number): RankCounts {
  const size = 2 ** Math.ceil(Math.log2(Math.max(places, 1)));
  const stepsPerPoint = 2 ** Math.min(SCORE_BITS, KEY_BITS - Math.log2(size)) / HIGHEST_SCORE;
  const keys = new Float64Array(places);
  const sorted = new Float64Array(places);
  const sort = sortEvenly(places);
  const counts = new Float64Array(places * places);
  const order = new Int32Array(places);
  const steps = new Float64Array(places);
  const add = (scores: Float64Array): void => {
    for (let place = 0; place < places; place++) {
      const step = Math.round((scores[place] ?? 0) * stepsPerPoint);
      steps[place] = step;
      // Counted down, so that an ascending sort puts the best first and, of equals, the first named.
      keys[place] = place - step * size;
    }
    sort(keys, sorted);
    let first = 0;
    let firstStep = 0;
    for (let rank = 0; rank < places; rank++) {
      const key = sorted[rank] ?? 0;
      const step = Math.floor(key / size);
      if (rank > first && step !== firstStep) {
        countRun(counts, order, first, rank);
        first = rank;
      }
      firstStep = step;
      order[rank] = key - step * size;
    }
    countRun(counts, order, first, places);
  };
  return { counts, order, steps, add };
}

/** Places that tie fill the ranks from `first` to before `next`, in equal parts. */
function countRun(counts: Float64Array, order: Int32Array, first: number, next: number): void {
  const part = 1 / (next - first);
  for (let member = first; member < next; member++) {
    const row = (order[member] ?? 0) * order.length;
    for (let rank = first; rank < next; rank++) counts[row + rank] = (counts[row + rank] ?? 0) + part;
  }
}
