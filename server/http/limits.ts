import type { Knex } from 'knex';
import { AppError } from './app-error.ts';
import { countRequest } from './request-counts-store.ts';

/** Up to this many a minute an exact count over all processes is worth a statement; above it each process counts for itself. */
export const COUNTED_IN_DATABASE_UP_TO = 60;

const MINUTE_MS = 60_000;

interface Spending {
  readonly bucket: string;
  readonly perMinute: number;
}

/** Counts in PostgreSQL, over all processes; throws `too_many_requests` beyond `perMinute`. */
export async function spendShared(deps: { db: Knex; now: () => Date }, { bucket, perMinute }: Spending): Promise<void> {
  const now = deps.now();
  const minute = new Date(Math.floor(now.getTime() / MINUTE_MS) * MINUTE_MS);
  const count = await countRequest(deps.db, { bucket, minute });
  if (count > perMinute) throw tooManyRequests(now);
}

/** A counter in the memory of this process; it holds one minute at a time, so it cannot grow for long. */
export function makeLocalCounter(now: () => Date): (spending: Spending) => void {
  let minute = 0;
  let counts = new Map<string, number>();
  return ({ bucket, perMinute }) => {
    const at = now();
    const thisMinute = Math.floor(at.getTime() / MINUTE_MS);
    if (thisMinute !== minute) {
      minute = thisMinute;
      counts = new Map();
    }
    const count = (counts.get(bucket) ?? 0) + 1;
    counts.set(bucket, count);
    if (count > perMinute) throw tooManyRequests(at);
  };
}

function tooManyRequests(now: Date): AppError {
  const retryAfterS = Math.max(1, Math.ceil((MINUTE_MS - (now.getTime() % MINUTE_MS)) / 1000));
  const unit = retryAfterS === 1 ? 'second' : 'seconds';
  return new AppError('too_many_requests', `Too many requests. Try again in ${retryAfterS} ${unit}.`, [], {
    retryAfterS,
  });
}
