/**
 * First light: people, teams, weather files and years, briefs and runs.
 * Every team-owned table carries team_id, and references within a team are on (team_id, id), so that no row can point into
 * another team. Hourly values are packed columns, never rows.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table people (
      id uuid primary key default gen_random_uuid(),
      email text not null unique check (email = lower(email) and email <> ''),
      name text not null check (name <> ''),
      password_hash text not null,
      created_at timestamptz not null default now()
    );

    create table sessions (
      sid text primary key,
      sess json not null,
      expire timestamptz not null
    );
    create index sessions_expire on sessions (expire);

    create table request_counts (
      bucket text not null,
      minute timestamptz not null,
      requests integer not null check (requests > 0),
      primary key (bucket, minute)
    );
    create index request_counts_minute on request_counts (minute);

    create table set_up_keys (
      key_hash text primary key,
      made_at timestamptz not null default now(),
      used_at timestamptz
    );

    create table teams (
      id uuid primary key default gen_random_uuid(),
      name text not null check (name <> ''),
      invented boolean not null default false,
      created_at timestamptz not null default now()
    );

    create table memberships (
      team_id uuid not null references teams (id),
      person_id uuid not null references people (id),
      role text not null check (role in ('viewer', 'planner', 'engineer', 'lead')),
      since timestamptz not null default now(),
      primary key (team_id, person_id)
    );
    create index memberships_person on memberships (person_id);

    create table audit_events (
      id bigint generated always as identity primary key,
      team_id uuid references teams (id),
      person_id uuid references people (id),
      act text not null check (act <> ''),
      subject jsonb not null default '{}',
      request_id text,
      at timestamptz not null default now()
    );
    create index audit_events_team on audit_events (team_id, at);

    create table stations (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      name text not null check (name <> ''),
      latitude double precision not null check (latitude between -90 and 90),
      longitude double precision not null check (longitude between -180 and 180),
      elevation_m double precision not null check (elevation_m between -500 and 9000),
      utc_offset_min integer not null check (utc_offset_min between -840 and 840),
      zone text not null,
      wmo_number text,
      created_at timestamptz not null default now(),
      unique (team_id, id)
    );

    create table weather_files (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      name text not null check (name <> ''),
      bytes bigint not null check (bytes >= 0),
      fingerprint text not null check (fingerprint ~ '^[0-9a-f]{64}$'),
      storage_key text not null,
      format text,
      status text not null check (status in ('reading', 'asks', 'review', 'accepted', 'refused', 'withdrawn', 'superseded')),
      step text check (step in ('received', 'reading', 'reducing', 'storing')),
      failure text,
      declared_station jsonb,
      asks jsonb not null default '[]',
      comments text,
      station_id uuid,
      uploaded_by uuid not null references people (id),
      uploaded_at timestamptz not null default now(),
      accepted_by uuid references people (id),
      accepted_at timestamptz,
      withdrawn_by uuid references people (id),
      withdrawn_at timestamptz,
      withdrawn_reason text,
      unique (team_id, id),
      foreign key (team_id, station_id) references stations (team_id, id),
      check ((step is null) or (status = 'reading')),
      check ((status <> 'accepted') or (station_id is not null and accepted_by is not null and accepted_at is not null)),
      check ((status <> 'withdrawn') or (withdrawn_by is not null and withdrawn_reason is not null))
    );
    create unique index weather_files_fingerprint on weather_files (team_id, fingerprint) where status <> 'withdrawn';
    create index weather_files_newest on weather_files (team_id, uploaded_at desc, id desc);

    create table findings (
      team_id uuid not null,
      weather_file_id uuid not null,
      position integer not null check (position >= 0),
      code text not null,
      severity text not null check (severity in ('note', 'repair', 'doubt', 'ask', 'refuse')),
      line integer check (line >= 1),
      col integer check (col >= 1),
      last_line integer check (last_line >= line),
      hours integer not null check (hours >= 0),
      message text not null,
      primary key (weather_file_id, position),
      foreign key (team_id, weather_file_id) references weather_files (team_id, id)
    );

    create table weather_years (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null,
      weather_file_id uuid not null unique,
      station_id uuid,
      kind text not null check (kind in ('typical', 'actual', 'derived')),
      year integer check ((kind = 'actual') = (year is not null)),
      utc_offset_min integer not null check (utc_offset_min between -840 and 840),
      slots integer not null check (slots in (8760, 8784)),
      layout smallint not null check (layout = 1),
      dry_bulb bytea compression lz4 not null check (length(dry_bulb) = slots * 2),
      humidity_ratio bytea compression lz4 not null check (length(humidity_ratio) = slots * 2),
      pressure bytea compression lz4 not null check (length(pressure) = slots * 2),
      flags bytea compression lz4 not null check (length(flags) = slots),
      histogram bytea compression lz4 not null,
      humidity_from text not null,
      below_zero text not null check (below_zero in ('water', 'ice')),
      facts jsonb not null,
      read_version text not null,
      content_hash text not null,
      created_at timestamptz not null default now(),
      unique (team_id, id),
      foreign key (team_id, weather_file_id) references weather_files (team_id, id),
      foreign key (team_id, station_id) references stations (team_id, id)
    );
    create index weather_years_station on weather_years (team_id, station_id);

    create table depression_hours (
      team_id uuid not null,
      weather_year_id uuid not null,
      month smallint not null check (month between 1 and 12),
      bin_k smallint not null check (bin_k >= 0),
      hours integer not null check (hours > 0),
      primary key (weather_year_id, month, bin_k),
      foreign key (team_id, weather_year_id) references weather_years (team_id, id)
    );

    create table design_values (
      team_id uuid not null,
      weather_year_id uuid not null,
      quantity text not null check (quantity in ('dry-bulb', 'wet-bulb', 'dew-point')),
      percent double precision not null check (percent > 0 and percent < 100),
      value_c double precision not null,
      coincident_c double precision not null,
      primary key (weather_year_id, quantity, percent),
      foreign key (team_id, weather_year_id) references weather_years (team_id, id)
    );

    create table programmes (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null references teams (id),
      name text not null check (name <> ''),
      created_at timestamptz not null default now(),
      unique (team_id, id)
    );

    create table briefs (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null,
      programme_id uuid not null,
      name text not null check (name <> ''),
      created_at timestamptz not null default now(),
      unique (team_id, id),
      foreign key (team_id, programme_id) references programmes (team_id, id)
    );

    create table brief_versions (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null,
      brief_id uuid not null,
      version integer not null check (version >= 1),
      body jsonb not null,
      hash text not null check (hash ~ '^[0-9a-f]{64}$'),
      made_by uuid not null references people (id),
      made_at timestamptz not null default now(),
      unique (team_id, id),
      unique (brief_id, version),
      foreign key (team_id, brief_id) references briefs (team_id, id)
    );

    create table runs (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null,
      weather_year_id uuid not null,
      brief_version_id uuid not null,
      method_version text not null,
      height_m double precision not null,
      clock jsonb not null,
      key_hash text not null check (key_hash ~ '^[0-9a-f]{64}$'),
      result jsonb not null,
      hour_classes bytea compression lz4 not null,
      result_hash text not null check (result_hash ~ '^[0-9a-f]{64}$'),
      made_at timestamptz not null default now(),
      unique (team_id, id),
      unique (weather_year_id, brief_version_id, key_hash),
      foreign key (team_id, weather_year_id) references weather_years (team_id, id),
      foreign key (team_id, brief_version_id) references brief_versions (team_id, id)
    );
    create index runs_brief_version on runs (team_id, brief_version_id);

    grant usage on schema public to muslin_app;
    grant select, insert, update, delete on
      people, sessions, request_counts, set_up_keys, teams, memberships, stations, weather_files, findings, weather_years,
      depression_hours, design_values, programmes, briefs to muslin_app;
    grant select, insert on audit_events, brief_versions, runs to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table runs, brief_versions, briefs, programmes, design_values, depression_hours, weather_years, findings,
      weather_files, stations, audit_events, memberships, teams, set_up_keys, request_counts, sessions, people;
  `);
}
