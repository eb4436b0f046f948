/**
 * What a lead takes out of the product: one archive of all that a team has here, made by a job and kept for a while in the store of
 * originals under the fingerprint of its bytes. Two kinds of notice more: that it is ready, and that a team is to be deleted.
 */
import type { Knex } from 'knex';

const KINDS = ['invitation', 'reset', 'review asked', 'signed off', 'comment', 'import finished'];
const NEW_KINDS = ['export ready', 'team deletion'];
const listed = (kinds: readonly string[]) => kinds.map((kind) => `'${kind}'`).join(', ');

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table team_exports (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      state text not null default 'making' check (state in ('making', 'ready', 'failed', 'over')),
      asked_by uuid not null references people (id),
      asked_at timestamptz not null,
      parts integer check (parts > 0),
      parts_done integer not null default 0 check (parts_done >= 0),
      bytes bigint check (bytes > 0),
      storage_key text,
      ready_at timestamptz,
      expires_at timestamptz check (expires_at > ready_at),
      unique (team_id, id),
      check (state <> 'ready' or (bytes is not null and storage_key is not null and expires_at is not null)),
      check (state <> 'over' or storage_key is null)
    );
    create index team_exports_newest on team_exports (team_id, asked_at desc, id);
    create unique index team_exports_making on team_exports (team_id) where state = 'making';
    create index team_exports_expiring on team_exports (expires_at) where state = 'ready';
    grant select, insert, update on team_exports to muslin_app;

    alter table notices drop constraint notices_kind_check,
      add constraint notices_kind_check check (kind in (${listed([...KINDS, ...NEW_KINDS])}));
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    delete from notices where kind in (${listed(NEW_KINDS)});
    alter table notices drop constraint notices_kind_check,
      add constraint notices_kind_check check (kind in (${listed(KINDS)}));
    drop table team_exports;
  `);
}
