/**
 * Depression hours by month and bin as one array of the weather year instead of a row for each: 768 counts, month-major, at place
 * (month - 1) x 64 + bin + 1, as `depressionHoursByMonth` of the engine lays them out. They stay in the row itself, so that hours over
 * a threshold in some months are summed over thousands of years without opening anything else.
 */
import type { Knex } from 'knex';

const BINS = 64;
const CELLS = 12 * BINS;

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table weather_years
      add column depression_hours smallint[] not null default array_fill(0::smallint, array[${CELLS}])
        check (array_ndims(depression_hours) = 1 and cardinality(depression_hours) = ${CELLS});
    alter table weather_years alter column depression_hours set storage main;
    update weather_years set depression_hours = counted.hours
    from (
      select years.id, array_agg(coalesce(depression_hours.hours, 0)::smallint order by cell) as hours
      from weather_years as years
      cross join generate_series(0, ${CELLS - 1}) as cell
      left join depression_hours on depression_hours.weather_year_id = years.id
        and depression_hours.month = cell / ${BINS} + 1 and depression_hours.bin_k = cell % ${BINS}
      group by years.id
    ) as counted
    where counted.id = weather_years.id;
    alter table weather_years alter column depression_hours drop default;
    drop table depression_hours;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    create table depression_hours (
      team_id uuid not null,
      weather_year_id uuid not null,
      month smallint not null check (month between 1 and 12),
      bin_k smallint not null check (bin_k >= 0),
      hours integer not null check (hours > 0),
      primary key (weather_year_id, month, bin_k),
      foreign key (team_id, weather_year_id) references weather_years (team_id, id)
    );
    grant select, insert, update, delete on depression_hours to muslin_app;
    insert into depression_hours (team_id, weather_year_id, month, bin_k, hours)
    select years.team_id, years.id, (counted.place - 1) / ${BINS} + 1, (counted.place - 1) % ${BINS}, counted.hours
    from weather_years as years
    cross join unnest(years.depression_hours) with ordinality as counted (hours, place)
    where counted.hours > 0;
    alter table weather_years drop column depression_hours;
  `);
}
