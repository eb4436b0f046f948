import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';

/** A brief version with who made it and where it is used. */
export interface VersionRow {
  readonly briefId: string;
  readonly name: string;
  readonly versionId: string;
  readonly version: number;
  readonly newest: number;
  readonly hash: string;
  readonly body: Brief;
  readonly madeBy: string;
  readonly madeAt: Date;
  readonly stationsJudged: number;
  readonly stationsPending: number;
}

export interface VersionStation {
  readonly id: string;
  readonly name: string;
  readonly judged: boolean;
}

interface BriefsKey {
  readonly teamId: string;
  readonly programmeId: string;
  readonly methodVersion: string;
}

/** The programme's briefs by their newest versions, the one saved last first. */
export async function listNewestVersions(db: Knex, key: BriefsKey): Promise<readonly VersionRow[]> {
  const rows = await selectVersions(db, 'where versions.version = versions.newest', key);
  return rows.toSorted((one, other) => other.madeAt.getTime() - one.madeAt.getTime());
}

/** Every version of a brief, newest first; empty when the programme has no such brief. */
export function listVersions(db: Knex, key: BriefsKey & { briefId: string }): Promise<readonly VersionRow[]> {
  return selectVersions(db, 'where versions.brief_id = :briefId', key);
}

export async function findVersion(
  db: Knex,
  key: BriefsKey & { briefId: string; version: number },
): Promise<VersionRow | null> {
  const condition = 'where versions.brief_id = :briefId and versions.version = :version';
  return (await selectVersions(db, condition, key))[0] ?? null;
}

/** A station is judged when a year of it is, under the method asked for; it waits while an accepted year has no run. */
async function selectVersions(db: Knex, condition: string, key: BriefsKey & object): Promise<readonly VersionRow[]> {
  const { rows } = await db.raw<{ rows: VersionRow[] }>(
    `with versions as (
       select brief_versions.*, briefs.name as brief_name,
         max(brief_versions.version) over (partition by brief_versions.brief_id) as newest
       from briefs
       join brief_versions on brief_versions.team_id = briefs.team_id and brief_versions.brief_id = briefs.id
       where briefs.team_id = :teamId and briefs.programme_id = :programmeId
     )
     select versions.brief_id as "briefId", versions.brief_name as name, versions.id as "versionId", versions.version,
       versions.newest, versions.hash, versions.body, people.name as "madeBy", versions.made_at as "madeAt",
       used.judged as "stationsJudged", used.pending as "stationsPending"
     from versions
     join people on people.id = versions.made_by
     cross join lateral (
       select count(distinct weather_years.station_id) filter (where runs.id is not null)::integer as judged,
         count(distinct weather_years.station_id) filter (where runs.id is null)::integer as pending
       from weather_years
       join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
       left join runs on runs.weather_year_id = weather_years.id and runs.brief_version_id = versions.id
         and runs.method_version = :methodVersion and runs.adjusted_from_m is null
       where weather_years.team_id = :teamId
     ) as used
     ${condition}
     order by versions.brief_id, versions.version desc`,
    { ...key },
  );
  return rows;
}

/** The stations with accepted weather, by name, and whether a year of each is judged by the version. */
export async function listStationsOfVersion(
  db: Knex,
  key: { teamId: string; versionId: string; methodVersion: string },
): Promise<readonly VersionStation[]> {
  const { rows } = await db.raw<{ rows: VersionStation[] }>(
    `select stations.id, stations.name, bool_or(runs.id is not null) as judged
     from stations
     join weather_years on weather_years.team_id = stations.team_id and weather_years.station_id = stations.id
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     left join runs on runs.weather_year_id = weather_years.id and runs.brief_version_id = :versionId
       and runs.method_version = :methodVersion and runs.adjusted_from_m is null
     where stations.team_id = :teamId
     group by stations.id
     order by stations.name, stations.id`,
    key,
  );
  return rows;
}

export async function programmeExists(db: Knex, key: { teamId: string; programmeId: string }): Promise<boolean> {
  const { rows } = await db.raw<{ rows: { found: boolean }[] }>(
    'select exists (select 1 from programmes where team_id = :teamId and id = :programmeId) as found',
    { ...key },
  );
  return rows[0]?.found ?? false;
}
