import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';
import { isApiError } from '../lib/api-error.ts';
import { sessionQuery } from '../lib/session-query.ts';

const MAX_RETRIES = 4;
const LONGEST_WAIT_MS = 30_000;

/**
 * The cache of answers. Only a lost connection and a server that asks to be called again later are retried; every other
 * answer is final. A 401 anywhere means that the session has ended: the shell then leads to signing in and back.
 */
export function makeQueryClient(): QueryClient {
  const whenSignedOut = (error: unknown): void => {
    if (isApiError(error, 'not_signed_in'))
      client.setQueryData(sessionQuery.queryKey, { person: null, memberships: [] });
  };
  const client: QueryClient = new QueryClient({
    queryCache: new QueryCache({ onError: whenSignedOut }),
    mutationCache: new MutationCache({ onError: whenSignedOut }),
    defaultOptions: {
      queries: { retry: isWorthRetrying, retryDelay: waitBeforeRetryMs, networkMode: 'always', staleTime: 30_000 },
      mutations: { retry: false, networkMode: 'always' },
    },
  });
  client.setQueryDefaults(sessionQuery.queryKey, { staleTime: Number.POSITIVE_INFINITY });
  return client;
}

export function isWorthRetrying(failures: number, error: unknown): boolean {
  return failures < MAX_RETRIES && (isApiError(error, 'network') || isApiError(error, 'unavailable'));
}

/** What the server asked for, else 1, 2, 4, 8 seconds. */
export function waitBeforeRetryMs(failures: number, error: unknown): number {
  const askedMs = isApiError(error) && error.retryAfterS !== null ? error.retryAfterS * 1000 : 1000 * 2 ** failures;
  return Math.min(LONGEST_WAIT_MS, askedMs);
}
