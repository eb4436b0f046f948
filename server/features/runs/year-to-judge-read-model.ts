import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';

/** What judging a weather year needs beside its hours. */
export interface YearToJudge {
  readonly contentHash: string;
  readonly stationId: string;
  readonly zone: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly briefHash: string;
  readonly brief: Brief;
}

/** `null` when the year does not count (its file is not, or no longer, accepted) or there is no such brief version. */
export async function findYearToJudge(
  db: Knex,
  key: { teamId: string; weatherYearId: string; briefVersionId: string },
): Promise<YearToJudge | null> {
  const { rows } = await db.raw<{ rows: YearToJudge[] }>(
    `select weather_years.content_hash as "contentHash", stations.id as "stationId", stations.zone,
       stations.latitude, stations.longitude, stations.elevation_m as "elevationM", brief_versions.hash as "briefHash", brief_versions.body as brief
     from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     join stations on stations.team_id = weather_years.team_id and stations.id = weather_years.station_id
     join brief_versions on brief_versions.team_id = weather_years.team_id and brief_versions.id = :briefVersionId
     where weather_years.team_id = :teamId and weather_years.id = :weatherYearId`,
    key,
  );
  return rows[0] ?? null;
}
