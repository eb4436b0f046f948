/**
 * The weather room: batches of uploads with their archives, files of several years or stations as parts, answers to what a file
 * asks, mappings of tables by shape, rules switched off at a station, superseding and refusing by a person, licence classes,
 * stations that were merged, tokens of programs.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table weather_batches (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      name text not null check (name <> ''),
      state text not null default 'running' check (state in ('running', 'paused', 'cancelled')),
      made_by uuid not null references people (id),
      made_at timestamptz not null default now(),
      changed_by uuid references people (id),
      changed_at timestamptz,
      unique (team_id, id)
    );
    create index weather_batches_newest on weather_batches (team_id, made_at desc, id desc);

    create table weather_archives (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null,
      batch_id uuid not null,
      name text not null check (name <> ''),
      bytes bigint not null check (bytes >= 0),
      fingerprint text not null check (fingerprint ~ '^[0-9a-f]{64}$'),
      storage_key text not null,
      status text not null default 'waiting' check (status in ('waiting', 'opening', 'opened', 'refused', 'cancelled')),
      problem text,
      failure text,
      members integer check (members >= 0),
      next_entry integer not null default 0 check (next_entry >= 0),
      members_opened integer not null default 0 check (members_opened >= 0),
      left_out jsonb not null default '[]',
      unique (team_id, id),
      foreign key (team_id, batch_id) references weather_batches (team_id, id),
      check ((status = 'refused') = (problem is not null))
    );
    create index weather_archives_batch on weather_archives (batch_id);

    alter table weather_files
      add column batch_id uuid,
      add column part_index integer not null default 0 check (part_index >= 0),
      add column part text not null default '',
      add column answers jsonb not null default '{}',
      add column table_guess jsonb,
      add column shape_key text,
      add column licence text not null default 'unknown'
        check (licence in ('open', 'attribution', 'non-commercial', 'no redistribution', 'unknown')),
      add column attribution text,
      add column refused_by uuid references people (id),
      add column refused_at timestamptz,
      add column refused_reason text,
      add column superseded_by uuid,
      add column superseded_at timestamptz,
      add column superseded_by_person uuid references people (id),
      add foreign key (team_id, batch_id) references weather_batches (team_id, id),
      add foreign key (team_id, superseded_by) references weather_files (team_id, id),
      add check ((status <> 'superseded') or (superseded_by is not null and superseded_by_person is not null));
    drop index weather_files_fingerprint;
    create unique index weather_files_fingerprint on weather_files (team_id, fingerprint, part_index) where status <> 'withdrawn';
    create index weather_files_batch on weather_files (batch_id) where batch_id is not null;
    create index weather_files_station on weather_files (team_id, station_id) where station_id is not null;

    alter table findings
      add column variable text,
      add column done text;

    create table table_mappings (
      team_id uuid not null references teams (id),
      shape_key text not null,
      mapping jsonb not null,
      made_by uuid not null references people (id),
      made_at timestamptz not null default now(),
      primary key (team_id, shape_key)
    );

    create table rules_off (
      team_id uuid not null,
      station_id uuid not null,
      rule text not null check (rule <> ''),
      reason text not null check (reason <> ''),
      set_by uuid not null references people (id),
      set_at timestamptz not null default now(),
      primary key (station_id, rule),
      foreign key (team_id, station_id) references stations (team_id, id)
    );

    alter table stations
      add column merged_into uuid,
      add foreign key (team_id, merged_into) references stations (team_id, id),
      add check (merged_into <> id);

    create table api_tokens (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      name text not null check (name <> ''),
      token_hash text not null unique check (token_hash ~ '^[0-9a-f]{64}$'),
      scopes text[] not null check (cardinality(scopes) > 0),
      made_by uuid not null references people (id),
      made_at timestamptz not null default now(),
      expires_at timestamptz not null check (expires_at > made_at),
      last_used_at timestamptz,
      revoked_by uuid references people (id),
      revoked_at timestamptz,
      unique (team_id, id)
    );

    grant select, insert, update on api_tokens, weather_batches, weather_archives, table_mappings to muslin_app;
    grant select, insert, update, delete on rules_off to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table stations drop column merged_into;
    drop table api_tokens, rules_off, table_mappings;
    alter table findings drop column variable, drop column done;
    drop index weather_files_fingerprint, weather_files_batch, weather_files_station;
    alter table weather_files
      drop column batch_id, drop column part_index, drop column part, drop column answers, drop column table_guess, drop column shape_key,
      drop column licence, drop column attribution, drop column refused_by, drop column refused_at,
      drop column refused_reason, drop column superseded_by, drop column superseded_at, drop column superseded_by_person;
    create unique index weather_files_fingerprint on weather_files (team_id, fingerprint) where status <> 'withdrawn';
    drop table weather_archives, weather_batches;
  `);
}
