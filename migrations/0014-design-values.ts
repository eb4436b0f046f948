/**
 * Design values stand in the facts of their weather year alone. Their own table was written with every year and read by nothing.
 */
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw('drop table design_values;');
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
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
    grant select, insert, update, delete on design_values to muslin_app;
    insert into design_values (team_id, weather_year_id, quantity, percent, value_c, coincident_c)
    select years.team_id, years.id, quantity.name, design.percent, design."valueC", design."coincidentC"
    from weather_years as years
    cross join (values ('dry-bulb', 'dryBulb'), ('wet-bulb', 'wetBulb'), ('dew-point', 'dewPoint')) as quantity (name, key)
    cross join jsonb_to_recordset(years.facts -> 'design' -> quantity.key) as design (percent double precision,
      "valueC" double precision, "coincidentC" double precision);
  `);
}
