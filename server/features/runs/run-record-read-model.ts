import type { Knex } from 'knex';
import type { Brief } from '#engine/brief/brief.ts';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import { OF_CLOSED } from './closed-programme-read-model.ts';
import type { RunFigures } from './run-key.ts';

export interface RunRow {
  readonly runId: string;
  readonly stationId: string;
  readonly stationName: string;
  readonly zone: string;
  readonly weatherFileId: string;
  readonly fileName: string;
  readonly kind: YearKind;
  readonly year: number | null;
  readonly heightM: number;
  readonly adjustedFromM: number | null;
  readonly clock: ResolvedClock;
  readonly methodVersion: string;
  readonly briefName: string;
  readonly briefVersion: number;
  readonly brief: Brief;
  readonly result: Omit<RunFigures, 'demandByMonthHour' | 'metByMonthHour' | 'aloneHours'>;
}

/** `null` when the team has no such run, or it is of a closed programme. */
export async function findRunRecord(
  db: Knex,
  key: { teamId: string; runId: string; closed: readonly string[] },
): Promise<RunRow | null> {
  const { rows } = await db.raw<{ rows: RunRow[] }>(
    `select runs.id as "runId", stations.id as "stationId", stations.name as "stationName", stations.zone,
       weather_files.id as "weatherFileId", weather_files.name as "fileName", weather_years.kind, weather_years.year,
       runs.height_m as "heightM", runs.adjusted_from_m as "adjustedFromM", runs.clock,
       runs.method_version as "methodVersion", briefs.name as "briefName", brief_versions.version as "briefVersion",
       brief_versions.body as brief,
       runs.result - array['demandByMonthHour', 'metByMonthHour', 'aloneHours'] as result
     from runs
     join weather_years on weather_years.team_id = runs.team_id and weather_years.id = runs.weather_year_id
     join weather_files on weather_files.id = weather_years.weather_file_id
     join stations on stations.team_id = weather_years.team_id and stations.id = weather_years.station_id
     join brief_versions on brief_versions.team_id = runs.team_id and brief_versions.id = runs.brief_version_id
     join briefs on briefs.id = brief_versions.brief_id
     where runs.team_id = ? and runs.id = ? and not ${OF_CLOSED}`,
    [key.teamId, key.runId, [...key.closed]],
  );
  return rows[0] ?? null;
}
