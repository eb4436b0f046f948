import type { WeatherYear } from '#engine/reduction/weather-year.ts';
import type { OriginalToRead } from '../../jobs/year-task.ts';
import type { YearThread } from '../../jobs/year-thread.ts';

/** Some 35 kB each. */
const MOST_KEPT = 64;

export interface LinesOfYears {
  /** Line of each slot of a weather year, 0 where none holds it; null where no original leads to it any more. */
  of(year: {
    readonly teamId: string;
    readonly fileId: string;
    readonly contentHash: string;
    readonly year: WeatherYear;
    readonly zone: string;
    readonly signal: AbortSignal;
  }): Promise<Uint32Array | null>;
}

/** Originals are read again once for many pages of hours. */
export function makeLinesOfYears(parts: {
  readonly yearThread: Pick<YearThread, 'readLines'>;
  readonly originalToRead: (key: { teamId: string; fileId: string }) => Promise<OriginalToRead | null>;
}): LinesOfYears {
  const kept = new Map<string, Uint32Array | null>();
  return {
    async of({ teamId, fileId, contentHash, year, zone, signal }) {
      const key = `${teamId} ${fileId} ${contentHash}`;
      const known = kept.get(key);
      if (known !== undefined) return known;
      const original = await parts.originalToRead({ teamId, fileId });
      const lines = original === null ? null : await parts.yearThread.readLines({ original, year, zone }, signal);
      const [longestThere] = kept.keys();
      if (kept.size >= MOST_KEPT && longestThere !== undefined) kept.delete(longestThere);
      kept.set(key, lines);
      return lines;
    },
  };
}
