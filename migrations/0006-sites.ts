/**
 * Sites of a programme with their gates, water and duties, every change of them, and the imports that brought many at once. A site that
 * is removed keeps its row, since its letters are never given again and sheets may speak of it.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table programmes add column site_letters_given integer not null default 0 check (site_letters_given >= 0);

    create table site_imports (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null,
      programme_id uuid not null,
      name text not null check (name <> ''),
      status text not null default 'receiving' check (status in ('receiving', 'done', 'undone')),
      sites integer check (sites >= 0),
      made_by uuid not null references people (id),
      made_at timestamptz not null default now(),
      undone_by uuid references people (id),
      undone_at timestamptz,
      unique (team_id, id),
      foreign key (team_id, programme_id) references programmes (team_id, id),
      check ((status = 'receiving') = (sites is null)),
      check ((status = 'undone') = (undone_by is not null and undone_at is not null))
    );
    create index site_imports_newest on site_imports (team_id, programme_id, made_at desc, id desc);

    create table site_import_rows (
      team_id uuid not null,
      import_id uuid not null,
      line integer not null check (line >= 1),
      cells jsonb not null,
      primary key (import_id, line),
      foreign key (team_id, import_id) references site_imports (team_id, id)
    );

    create table sites (
      id uuid primary key default gen_random_uuid(),
      team_id uuid not null,
      programme_id uuid not null,
      letters text not null check (letters ~ '^[a-z]+$'),
      name text not null check (name <> ''),
      latitude double precision not null check (latitude between -90 and 90),
      longitude double precision not null check (longitude between -180 and 180),
      elevation_m double precision check (elevation_m between -500 and 9000),
      elevation_source text check (elevation_source in ('person', 'file', 'relief')),
      relief_m double precision,
      km_from_land double precision not null default 0 check (km_from_land >= 0),
      design_load_kw double precision check (design_load_kw > 0),
      station_id uuid,
      station_reason text,
      gates jsonb not null default '[]',
      water jsonb not null default '{}',
      notes text not null default '',
      import_id uuid,
      revision integer not null default 1 check (revision >= 1),
      made_by uuid not null references people (id),
      made_at timestamptz not null default now(),
      changed_by uuid not null references people (id),
      changed_at timestamptz not null default now(),
      removed_by uuid references people (id),
      removed_at timestamptz,
      removed_reason text,
      unique (team_id, id),
      unique (programme_id, letters),
      foreign key (team_id, programme_id) references programmes (team_id, id),
      foreign key (team_id, station_id) references stations (team_id, id),
      foreign key (team_id, import_id) references site_imports (team_id, id),
      check ((elevation_m is null) = (elevation_source is null)),
      check ((station_reason is null) or (station_id is not null)),
      check ((removed_at is null) = (removed_by is null) and (removed_at is null) = (removed_reason is null))
    );
    create index sites_programme on sites (team_id, programme_id) where removed_at is null;
    create index sites_import on sites (import_id) where import_id is not null;

    create table site_changes (
      team_id uuid not null,
      site_id uuid not null,
      revision integer not null check (revision >= 2),
      changed_by uuid not null references people (id),
      changed_at timestamptz not null default now(),
      fields jsonb not null,
      primary key (site_id, revision),
      foreign key (team_id, site_id) references sites (team_id, id)
    );

    create table site_duties (
      team_id uuid not null,
      site_id uuid not null,
      duty text not null check (duty in ('water safety plan', 'notification', 'noise', 'drain-down')),
      owner text not null default '',
      due_on date,
      done_on date,
      note text not null default '',
      set_by uuid not null references people (id),
      set_at timestamptz not null default now(),
      primary key (site_id, duty),
      foreign key (team_id, site_id) references sites (team_id, id)
    );

    grant select, insert, update on site_imports, sites, site_duties to muslin_app;
    grant select, insert on site_changes to muslin_app;
    grant select, insert, update, delete on site_import_rows to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table site_duties, site_changes, sites, site_import_rows, site_imports;
    alter table programmes drop column site_letters_given;
  `);
}
