/**
 * Heartbeats of the job workers. A job stays locked by the pool that took it; a pool that has fallen silent (killed, machine
 * gone) is unlocked by any other, so that its jobs are tried again.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table worker_pools (
      id text primary key,
      started_at timestamptz not null default now(),
      seen_at timestamptz not null default now()
    );
    grant select, insert, update, delete on worker_pools to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table worker_pools;');
}
