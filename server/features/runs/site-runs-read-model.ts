import type { Knex } from 'knex';

/** An accepted year with its station's height, m: where it stands as measured. */
export interface YearAtStation {
  readonly weatherYearId: string;
  readonly stationId: string;
  readonly elevationM: number;
}

export async function listYearsAtStations(db: Knex, teamId: string): Promise<readonly YearAtStation[]> {
  const { rows } = await db.raw<{ rows: YearAtStation[] }>(
    `select weather_years.id as "weatherYearId", stations.id as "stationId", stations.elevation_m as "elevationM"
     from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     join stations on stations.team_id = weather_years.team_id and stations.id = weather_years.station_id
     where weather_years.team_id = ?
     order by weather_years.station_id, weather_years.id`,
    [teamId],
  );
  return rows;
}

export interface RunOfSites {
  readonly weatherYearId: string;
  readonly briefVersionId: string;
  readonly heightM: number;
  readonly adjustedFromM: number;
}

/** The runs at heights of sites that some brief versions have. */
export async function listRunsOfSites(
  db: Knex,
  asked: { teamId: string; briefVersionIds: readonly string[]; methodVersion: string },
): Promise<readonly RunOfSites[]> {
  const { rows } = await db.raw<{ rows: RunOfSites[] }>(
    `select runs.weather_year_id as "weatherYearId", runs.brief_version_id as "briefVersionId",
       runs.height_m as "heightM", runs.adjusted_from_m as "adjustedFromM"
     from runs
     where runs.team_id = :teamId and runs.brief_version_id = any(:briefVersionIds::uuid[])
       and runs.method_version = :methodVersion and runs.adjusted_from_m is not null`,
    { ...asked, briefVersionIds: `{${asked.briefVersionIds.join(',')}}` },
  );
  return rows;
}

/** The newest version of each brief of a programme. */
export async function newestVersionsOfProgramme(
  db: Knex,
  key: { teamId: string; programmeId: string },
): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select distinct on (brief_versions.brief_id) brief_versions.id
     from briefs
     join brief_versions on brief_versions.team_id = briefs.team_id and brief_versions.brief_id = briefs.id
     where briefs.team_id = :teamId and briefs.programme_id = :programmeId
     order by brief_versions.brief_id, brief_versions.version desc`,
    { ...key },
  );
  return rows.map(({ id }) => id);
}

/** Programmes that have sites: of one team, or of all. */
export async function listProgrammesWithSites(
  db: Knex,
  { teamId }: { teamId: string | null },
): Promise<readonly { teamId: string; programmeId: string }[]> {
  const { rows } = await db.raw<{ rows: { teamId: string; programmeId: string }[] }>(
    `select distinct sites.team_id as "teamId", sites.programme_id as "programmeId"
     from sites
     where sites.removed_at is null and (:teamId::uuid is null or sites.team_id = :teamId)`,
    { teamId },
  );
  return rows;
}
