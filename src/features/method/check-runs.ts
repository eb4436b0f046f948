import { queryOptions } from '@tanstack/react-query';
import { getMethodChecks, type PublishedCheck } from '../../contract/method.ts';
import type { CheckAnswer } from '../../engine/checks/published-check.ts';
import { METHOD_VERSION } from '../../engine/conventions.ts';
import { call } from '../../lib/api-client.ts';

export interface CheckRun {
  readonly check: PublishedCheck;
  readonly answers: readonly CheckAnswer[];
  /** The product computes no such thing, or otherwise; the formula stands for comparison alone. */
  readonly isComparison: boolean;
}

/** Fetches the published checks and runs each in the engine, here in the browser; the engine comes with the first of them. */
export const checkRunsQuery = queryOptions({
  queryKey: [getMethodChecks.path, 'run', METHOD_VERSION],
  queryFn: async ({ signal }): Promise<readonly CheckRun[]> => {
    const [{ checks, tables }, { comparisonChecks, runCheck }] = await Promise.all([
      call(getMethodChecks, { params: {}, query: {} }, { signal }),
      import('../../engine/checks/run-check.ts'),
    ]);
    const runs: CheckRun[] = [];
    for (const check of checks) {
      signal.throwIfAborted();
      runs.push({ check, answers: runCheck(check, tables), isComparison: comparisonChecks.includes(check.id) });
      await turn();
    }
    return runs;
  },
  staleTime: Number.POSITIVE_INFINITY,
});

/** Lets the page answer between two checks. */
function turn(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, 0));
}
