/**
 * The packed years that a thread has judged lately, as the same objects: what the engine derives from a year (its wet bulbs) is
 * kept beside the object, so that the next draft of a brief need not derive it again.
 */
import { availableParallelism } from 'node:os';
import type { PackedYear } from '#engine/reduction/weather-year.ts';
import { packedOver } from './shared-columns.ts';

/** Over all threads; some 130 kB each with what is derived. */
const MOST_YEARS = 6400;
const MOST_IN_THREAD = Math.floor(MOST_YEARS / availableParallelism());

const kept = new Map<string, PackedYear>();

export function keptYear(year: { weatherYearId: string; contentHash: string; columns: SharedArrayBuffer }): PackedYear {
  const key = `${year.weatherYearId} ${year.contentHash}`;
  const found = kept.get(key);
  if (found !== undefined) return found;
  const [longestThere] = kept.keys();
  if (kept.size >= MOST_IN_THREAD && longestThere !== undefined) kept.delete(longestThere);
  const packed = packedOver(year.columns);
  kept.set(key, packed);
  return packed;
}
