import type { Knex } from 'knex';

/** Accepted years without a run under the newest version of a brief of their team, and without a job that would make it. */
export async function findMissingRuns(
  db: Knex,
  methodVersion: string,
): Promise<readonly { teamId: string; weatherYearId: string; briefVersionId: string }[]> {
  const { rows } = await db.raw<{ rows: { teamId: string; weatherYearId: string; briefVersionId: string }[] }>(
    `with newest as (
       select distinct on (brief_versions.brief_id) brief_versions.team_id, brief_versions.id
       from brief_versions
       order by brief_versions.brief_id, brief_versions.version desc
     )
     select weather_years.team_id as "teamId", weather_years.id as "weatherYearId", newest.id as "briefVersionId"
     from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     join stations on stations.team_id = weather_years.team_id and stations.id = weather_years.station_id
     join newest on newest.team_id = weather_years.team_id
     where not exists (
         select 1 from runs
         where runs.weather_year_id = weather_years.id and runs.brief_version_id = newest.id
           and runs.method_version = ? and runs.height_m = stations.elevation_m and runs.adjusted_from_m is null)
       and not exists (
         select 1 from graphile_worker.jobs
         where jobs.key = weather_years.id::text || ' ' || newest.id::text
           and (jobs.attempts < jobs.max_attempts or jobs.locked_at is not null))`,
    [methodVersion],
  );
  return rows;
}
