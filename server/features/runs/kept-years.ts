/**
 * The packed years that a thread has judged lately, as the same objects: what the engine derives from a year (its wet bulbs) is
 * kept beside the object, so that the next draft of a brief need not derive it again.
 */
import { availableParallelism } from 'node:os';
import type { PackedYear } from '#engine/reduction/weather-year.ts';
import { packedAtHeight } from './height-used.ts';
import { packedOver } from './shared-columns.ts';

/** Over all threads; some 150 kB each with what rooms derive, 290 kB with what every use does. */
const MOST_YEARS = 4800;
const MOST_IN_THREAD = Math.floor(MOST_YEARS / availableParallelism());

const kept = new Map<string, PackedYear>();

export function keptYear(year: {
  weatherYearId: string;
  contentHash: string;
  columns: SharedArrayBuffer;
  heightM: number;
  adjustedFromM: number | null;
}): PackedYear {
  const moved = year.adjustedFromM === null ? '' : ` ${year.adjustedFromM} to ${year.heightM}`;
  const key = `${year.weatherYearId} ${year.contentHash}${moved}`;
  const found = kept.get(key);
  if (found !== undefined) {
    // Maps keep the order in which their keys came.
    kept.delete(key);
    kept.set(key, found);
    return found;
  }
  const [longestUnused] = kept.keys();
  if (kept.size >= MOST_IN_THREAD && longestUnused !== undefined) kept.delete(longestUnused);
  const packed = packedAtHeight(packedOver(year.columns), year);
  kept.set(key, packed);
  return packed;
}
