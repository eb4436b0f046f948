import type { Knex } from 'knex';
import type { Licence } from '#contract/weather-reading.ts';
import type { Brief } from '#engine/brief/brief.ts';
import type { HumidityRule, MonthlyChange } from '#engine/climate/monthly-change.ts';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import { OF_CLOSED } from './closed-programme-read-model.ts';

/** A run of a team with what its hours are written from. */
export interface RunToExport {
  readonly weatherYearId: string;
  readonly kind: YearKind;
  readonly year: number | null;
  readonly weatherFileId: string;
  readonly contentHash: string;
  readonly fileName: string;
  readonly licence: Licence;
  readonly attribution: string | null;
  readonly stationName: string;
  readonly zone: string;
  readonly methodVersion: string;
  readonly heightM: number;
  readonly adjustedFromM: number | null;
  readonly clock: ResolvedClock;
  readonly hourClassCodes: Buffer;
  readonly brief: Brief;
  readonly briefName: string;
  readonly briefVersion: number;
  /** Of a derived year. */
  readonly derivation: {
    readonly parentFileName: string;
    readonly humidityRule: HumidityRule;
    readonly monthly: readonly MonthlyChange[];
  } | null;
}

/** `null` when the team has no such run, or it is of a closed programme. */
export async function findRunToExport(
  db: Knex,
  key: { teamId: string; runId: string; closed: readonly string[] },
): Promise<RunToExport | null> {
  const { rows } = await db.raw<{ rows: RunToExport[] }>(
    `select runs.weather_year_id as "weatherYearId", weather_years.kind, weather_years.year,
       weather_files.id as "weatherFileId", weather_years.content_hash as "contentHash", weather_files.name as "fileName",
       coalesce(parent_files.licence, weather_files.licence) as licence,
       coalesce(parent_files.attribution, weather_files.attribution) as attribution, stations.name as "stationName", stations.zone,
       runs.method_version as "methodVersion", runs.height_m as "heightM", runs.adjusted_from_m as "adjustedFromM", runs.clock,
       runs.hour_classes as "hourClassCodes", brief_versions.body as brief, briefs.name as "briefName",
       brief_versions.version as "briefVersion",
       case when derived_years.weather_year_id is not null then
         jsonb_build_object('parentFileName', parent_files.name, 'humidityRule', derived_years.humidity_rule,
           'monthly', derived_years.monthly)
       end as derivation
     from runs
     join weather_years on weather_years.team_id = runs.team_id and weather_years.id = runs.weather_year_id
     join weather_files on weather_files.id = weather_years.weather_file_id
     join stations on stations.team_id = weather_years.team_id and stations.id = weather_years.station_id
     join brief_versions on brief_versions.team_id = runs.team_id and brief_versions.id = runs.brief_version_id
     join briefs on briefs.id = brief_versions.brief_id
     left join derived_years on derived_years.weather_year_id = weather_years.id
     left join weather_years as parents on parents.id = derived_years.parent_year_id
     left join weather_files as parent_files on parent_files.id = parents.weather_file_id
     where runs.team_id = ? and runs.id = ? and not ${OF_CLOSED}`,
    [key.teamId, key.runId, [...key.closed]],
  );
  return rows[0] ?? null;
}
