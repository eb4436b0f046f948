import type { Brief } from '#engine/brief/brief.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import type { WebThreads } from '../../jobs/web-threads.ts';
import type { OriginalToRead } from '../../jobs/year-task.ts';
import type { YearThread } from '../../jobs/year-thread.ts';

/** What runs need of the other parts, handed in where the server is wired. */
export interface RunsParts {
  readonly threads: Pick<WebThreads, 'threads' | 'rescore' | 'range' | 'turning' | 'doubts' | 'rank' | 'surface'>;
  /** Approximate heights and coasts. */
  readonly relief: Relief;
  readonly yearThread: Pick<YearThread, 'writeHours' | 'listHours' | 'readLines'>;
  /** An original with what it was read by; null where no lines hold its hours. */
  readonly originalToRead: (key: { teamId: string; fileId: string }) => Promise<OriginalToRead | null>;
  /** The brief in a request's body, or every fault of it at its path. */
  readonly readDraft: (draft: unknown) => Brief;
}
