import type { Knex } from 'knex';
import { inTransaction } from '../db/in-transaction.ts';
import { giveBackJobs } from './worker-deaths.ts';

/** Says that a pool of workers lives. */
export async function beat(db: Knex, poolId: string): Promise<void> {
  await db.raw(
    `insert into worker_pools (id) values (?)
     on conflict (id) do update set seen_at = now()`,
    [poolId],
  );
}

export async function forgetPool(db: Knex, poolId: string): Promise<void> {
  await db.raw('delete from worker_pools where worker_pools.id = ?', [poolId]);
}

/**
 * Gives back the jobs of pools that have been silent for so long that they must be dead: killed, or their machine gone.
 * Also of pools that died before their first beat.
 * @returns the pools that were given up
 */
export async function releaseSilentPools(db: Knex, silentMs: number): Promise<readonly string[]> {
  return await inTransaction(db, async (transaction) => {
    const pools = await takeSilentPools(transaction, silentMs);
    if (pools.length > 0) await giveBackJobs(transaction, pools);
    return pools;
  });
}

async function takeSilentPools(transaction: Knex.Transaction, silentMs: number): Promise<readonly string[]> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `with silent as (
       delete from worker_pools where worker_pools.seen_at < now() - ?::integer * interval '1 millisecond'
       returning worker_pools.id
     )
     select silent.id from silent
     union
     select jobs.locked_by
     from graphile_worker.jobs
     where jobs.locked_at < now() - ?::integer * interval '1 millisecond'
       and not exists (select 1 from worker_pools where worker_pools.id = jobs.locked_by)`,
    [silentMs, silentMs],
  );
  return rows.map(({ id }) => id);
}
