/**
 * What a derived weather year was made of: its parent, the twelve monthly changes, the rule for humidity. Its file keeps the
 * same as bytes; here it can be joined. Written once, never changed.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table derived_years (
      team_id uuid not null,
      weather_year_id uuid primary key,
      parent_year_id uuid not null check (parent_year_id <> weather_year_id),
      humidity_rule text not null check (humidity_rule in ('ratio-kept', 'rh-kept', 'ratio-scaled')),
      monthly jsonb not null check (jsonb_array_length(monthly) = 12),
      capped_hours integer not null check (capped_hours between 0 and 8784),
      difference jsonb not null,
      foreign key (team_id, weather_year_id) references weather_years (team_id, id),
      foreign key (team_id, parent_year_id) references weather_years (team_id, id)
    );
    create index derived_years_parent on derived_years (team_id, parent_year_id);
    grant select, insert on derived_years to muslin_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table derived_years;');
}
