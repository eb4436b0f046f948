/**
 * What becomes of all that a team has. Taken out: one archive, made by a job and kept for a while in the store of originals under the
 * fingerprint of its bytes. Deleted: after a time in which any lead can stop it. The application may delete neither runs nor versions of
 * briefs; a function of the owner does, and only for a team whose time is over. The row of the team and its audit events stay, so that
 * the trail still says what happened. Two kinds of notice tell of both.
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

    create table team_deletions (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      team_name text not null,
      asked_by uuid not null references people (id),
      asked_at timestamptz not null,
      ends_at timestamptz not null check (ends_at > asked_at),
      stopped_by uuid references people (id),
      stopped_at timestamptz,
      ended_at timestamptz,
      -- Keys of the store that nobody else's rows named when the team ended; null when all of them have been seen to.
      originals jsonb,
      check ((stopped_by is null) = (stopped_at is null)),
      check (stopped_at is null or ended_at is null)
    );
    create unique index team_deletions_open on team_deletions (team_id) where stopped_at is null;
    create index team_deletions_due on team_deletions (ends_at) where stopped_at is null and ended_at is null;
    grant select, insert, update on team_deletions to muslin_app;

    alter table teams add column ended_at timestamptz;

    -- Tables are found by their team_id, and emptied before those that they point to: one that is added later is not forgotten.
    -- What keeps the trail stays: every table whose name begins with audit_.
    create function end_team(ending uuid) returns void
    language plpgsql security definer set search_path = pg_catalog, public, pg_temp as $body$
    declare
      left_over text[];
      emptied text;
    begin
      perform 1 from public.team_deletions
      where team_id = ending and stopped_at is null and ended_at is null and ends_at <= now() for update;
      if not found then
        raise exception 'the time of team % is not over', ending using errcode = 'insufficient_privilege';
      end if;
      update public.team_deletions set ended_at = now(), originals = (
        select coalesce(jsonb_agg(distinct held.key), '[]') from (
          select storage_key as key from public.weather_files where team_id = ending
          union select storage_key from public.weather_archives where team_id = ending
          union select storage_key from public.team_exports where team_id = ending and storage_key is not null
        ) as held)
      where team_id = ending and stopped_at is null and ended_at is null;

      select array_agg(columns.table_name::text) into left_over
      from information_schema.columns
      join information_schema.tables using (table_schema, table_name)
      where columns.table_schema = 'public' and columns.column_name = 'team_id' and tables.table_type = 'BASE TABLE'
        and columns.table_name not like 'audit\\_%' and columns.table_name <> 'team_deletions';
      while cardinality(left_over) > 0 loop
        select each into emptied from unnest(left_over) as each
        where not exists (
          select 1 from pg_constraint
          where contype = 'f' and confrelid = format('public.%I', each)::regclass and conrelid <> confrelid
            and conrelid::regclass in (select format('public.%I', other)::regclass from unnest(left_over) as other))
        limit 1;
        if emptied is null then
          raise exception 'tables point at one another: %', left_over;
        end if;
        execute format('delete from public.%I where team_id = $1', emptied) using ending;
        left_over := array_remove(left_over, emptied);
      end loop;
      update public.teams set ended_at = now() where id = ending;
    end
    $body$;
    revoke execute on function end_team(uuid) from public;
    grant execute on function end_team(uuid) to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop function end_team(uuid);
    alter table teams drop column ended_at;
    drop table team_deletions;
    delete from notices where kind in (${listed(NEW_KINDS)});
    alter table notices drop constraint notices_kind_check,
      add constraint notices_kind_check check (kind in (${listed(KINDS)}));
    drop table team_exports;
  `);
}
