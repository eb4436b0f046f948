/**
 * The height that the weather of a run was moved from, where it was moved to a site's; and what the map and lists need of a run, taken by the database itself out of the stored result, so that thousands of places are read
 * without opening a result each. Nothing can differ from the record: the columns are generated and cannot be written.
 */
import type { Knex } from 'knex';

/** In the order of a stored class. */
const CLASSES = 'closed missing idle frozen damp air direct indirect dewpoint twostage short beyond'.split(' ');

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table runs
      add column adjusted_from_m double precision check (adjusted_from_m <> height_m),
      add column usable boolean generated always as ((result ->> 'usable')::boolean) stored,
      add column months_short jsonb generated always as (result -> 'monthsShort') stored,
      add column score smallint generated always as ((result ->> 'score')::smallint) stored,
      add column score_exact double precision generated always as ((result ->> 'scoreExact')::double precision) stored,
      add column verdict text generated always as (result ->> 'verdict') stored,
      add column gates_failed jsonb generated always as
        (jsonb_path_query_array(result, '$.gates[*] \\? (@.answer == "fail").note')) stored,
      add column raw_components jsonb generated always as (jsonb_path_query_array(result, '$.parts[*].raw')) stored,
      add column class_hours smallint[] generated always as (array[${CLASSES.map(
        (name) => `(result #>> '{ledger,classes,${name}}')::smallint`,
      ).join(', ')}]) stored,
      add column demand_hours smallint generated always as ((result #>> '{ledger,demand}')::smallint) stored,
      add column met_hours smallint generated always as ((result #>> '{ledger,met}')::smallint) stored,
      add column litres_per_kwh double precision generated always as
        ((result #>> '{water,litresPerKwh}')::double precision) stored,
      add column saved_pct double precision generated always as
        ((result #>> '{electricity,savedPct}')::double precision) stored,
      add column spell_hours smallint generated always as ((result #>> '{worstSpell,hours}')::smallint) stored,
      add column severity_kh double precision generated always as ((result ->> 'severityKh')::double precision) stored;
    alter table weather_years
      add column measured_hours smallint generated always as ((facts ->> 'measuredHours')::smallint) stored;
    create index runs_of_version on runs (brief_version_id, weather_year_id, height_m);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop index runs_of_version;
    alter table weather_years drop column measured_hours;
    alter table runs
      drop column adjusted_from_m, drop column usable, drop column months_short, drop column score, drop column score_exact, drop column verdict,
      drop column gates_failed, drop column raw_components, drop column class_hours, drop column demand_hours,
      drop column met_hours, drop column litres_per_kwh, drop column saved_pct, drop column spell_hours,
      drop column severity_kh;
  `);
}
