import type { TestDatabase } from './test-database.ts';

/** Skips the waits between the tries of jobs, and wakes the workers, which else look every two seconds. */
export async function jobsDueNow({ ownerDb }: TestDatabase): Promise<void> {
  await ownerDb.raw('update graphile_worker._private_jobs set run_at = now() where locked_at is null');
  await ownerDb.raw(`select pg_notify('jobs:insert', '{"count":1}')`);
}
