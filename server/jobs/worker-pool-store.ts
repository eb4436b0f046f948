import type { Knex } from 'knex';

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
  const { rows } = await db.raw<{ rows: { pools: string[] | null }[] }>(
    `with silent as (
       delete from worker_pools where worker_pools.seen_at < now() - ?::integer * interval '1 millisecond'
       returning worker_pools.id
     ), unknown as (
       select distinct jobs.locked_by as id
       from graphile_worker.jobs
       where jobs.locked_at < now() - ?::integer * interval '1 millisecond'
         and not exists (select 1 from worker_pools where worker_pools.id = jobs.locked_by)
     ), dead as (
       select array_agg(gone.id) as pools from (select id from silent union select id from unknown) as gone
     )
     select dead.pools, graphile_worker.force_unlock_workers(dead.pools) from dead where dead.pools is not null`,
    [silentMs, silentMs],
  );
  return rows[0]?.pools ?? [];
}
