/**
 * What a job's payload says of workers that died with it in hand. A death is no try: the machine was switched off, or another job
 * ended the process. Such a job is done with nothing beside it, so that a worker that dies again died of this one.
 */
import type { Knex } from 'knex';

/** So many workers may die of a job that they did alone; then it is given up. Fewer could be chance where something else kills them. */
export const MOST_DEATHS_ALONE = 5;

export interface WorkerDeaths {
  /** Workers that died with the job in hand. */
  readonly deaths: number;
  /** Those of them that did nothing else. */
  readonly deathsAlone: number;
}

export function deathsOf(payload: unknown): WorkerDeaths {
  const found: Record<string, unknown> = { ...(typeof payload === 'object' ? payload : null) };
  const { deaths, deathsAlone } = found;
  return {
    deaths: typeof deaths === 'number' ? deaths : 0,
    deathsAlone: typeof deathsAlone === 'number' ? deathsAlone : 0,
  };
}

/** Says that a pool does a job with nothing beside it. */
export async function markAlone(db: Knex, job: { jobId: string; poolId: string }): Promise<void> {
  await db.raw(
    `update graphile_worker._private_jobs
     set payload = cast(cast(payload as jsonb) || jsonb_build_object('aloneIn', cast(:poolId as text)) as json)
     where id = cast(:jobId as bigint) and locked_by = :poolId`,
    job,
  );
}

/** A job that has come further than before is not what its workers died of. */
export async function clearBlame(db: Knex, jobId: string): Promise<void> {
  await db.raw(
    `update graphile_worker._private_jobs
     set payload = cast(cast(payload as jsonb) - 'deathsAlone' - 'aloneIn' as json)
     where id = cast(:jobId as bigint)`,
    { jobId },
  );
}

/** Gives back the jobs that dead pools had in hand, as if they had not been tried, and counts the death on each. */
export async function giveBackJobs(transaction: Knex.Transaction, poolIds: readonly string[]): Promise<void> {
  await transaction.raw(
    `update graphile_worker._private_jobs
     set locked_by = null, locked_at = null, attempts = greatest(0, attempts - 1),
       payload = cast((cast(payload as jsonb) - 'aloneIn') || jsonb_build_object(
         'deaths', coalesce(cast(payload ->> 'deaths' as integer), 0) + 1,
         'deathsAlone', coalesce(cast(payload ->> 'deathsAlone' as integer), 0)
           + case when payload ->> 'aloneIn' = locked_by then 1 else 0 end) as json)
     where locked_by = any(:poolIds)`,
    { poolIds },
  );
  // The named queues of the pools, of which we have none today.
  await transaction.raw('select graphile_worker.force_unlock_workers(cast(:poolIds as text[]))', { poolIds });
}
