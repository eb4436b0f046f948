import type { Knex } from 'knex';
import type { FileStatus } from '#contract/weather.ts';
import type { HumidityRule, MonthlyChange } from '#engine/climate/monthly-change.ts';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import type { RunFigures } from './run-key.ts';

/** An accepted weather year of a station, with its run under the brief version asked for where there is one. */
export interface StationYear {
  readonly stationId: string;
  readonly stationName: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly zone: string;
  readonly weatherYearId: string;
  readonly weatherFileId: string;
  readonly kind: YearKind;
  readonly year: number | null;
  readonly hours: number;
  /** Hours whose dry bulb and humidity are both as the source measured them. */
  readonly measuredHours: number;
  /** Every hour carries the same source flag, so the flags tell nothing. */
  readonly flagsUniform: boolean;
  /** Why background work on the file stopped for a fault of ours. */
  readonly failure: string | null;
  readonly run: RunOfYear | null;
  /** Of a derived year: its own name and the year that it was made of, which may no longer be accepted. */
  readonly derivedFrom: DerivedFrom | null;
}

export interface DerivedFrom {
  readonly name: string;
  readonly weatherYearId: string;
  readonly weatherFileId: string;
  readonly kind: Exclude<YearKind, 'derived'>;
  readonly year: number | null;
  readonly status: FileStatus;
  readonly humidityRule: HumidityRule;
  readonly monthly: readonly MonthlyChange[];
}

export interface RunOfYear {
  readonly id: string;
  readonly clock: ResolvedClock;
  /** A run's figures without its tables, which no screen of places needs. */
  readonly figures: Omit<RunFigures, 'demandByMonthHour' | 'metByMonthHour' | 'supplyCurve' | 'aloneHours'>;
}

/**
 * Every accepted year of the team's stations, or of one, by station name, newest file first; one query for a whole map. Of several
 * runs of one year under the version (the station's zone was corrected since) the newest counts.
 */
export async function listStationYears(
  db: Knex,
  asked: {
    teamId: string;
    briefVersionId: string;
    methodVersion: string;
    stationId?: string;
    /** Height of a site that the weather is moved to; left out: the station's own. */
    heightM?: number;
  },
): Promise<readonly StationYear[]> {
  const atHeight =
    asked.heightM === undefined
      ? 'and runs.height_m = stations.elevation_m and runs.adjusted_from_m is null'
      : 'and runs.height_m = :heightM and runs.adjusted_from_m = stations.elevation_m';
  const oneStation = asked.stationId === undefined ? '' : 'and stations.id = :stationId';
  const { rows } = await db.raw<{ rows: StationYear[] }>(
    `select stations.id as "stationId", stations.name as "stationName", stations.latitude, stations.longitude,
       stations.elevation_m as "elevationM", stations.zone,
       weather_years.id as "weatherYearId", weather_files.id as "weatherFileId", weather_years.kind, weather_years.year,
       weather_years.slots as hours, weather_years.measured_hours as "measuredHours",
       exists (
         select 1 from findings
         where findings.weather_file_id = weather_files.id and findings.code = 'source-flags-uniform'
       ) as "flagsUniform",
       weather_files.failure, newest.run,
       case when derived_years.weather_year_id is not null then
         jsonb_build_object('name', weather_files.name, 'weatherYearId', parents.id, 'weatherFileId', parent_files.id,
           'kind', parents.kind, 'year', parents.year, 'status', parent_files.status,
           'humidityRule', derived_years.humidity_rule, 'monthly', derived_years.monthly)
       end as "derivedFrom"
     from stations
     join weather_years on weather_years.team_id = stations.team_id and weather_years.station_id = stations.id
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     left join derived_years on derived_years.weather_year_id = weather_years.id
     left join weather_years as parents on parents.id = derived_years.parent_year_id
     left join weather_files as parent_files on parent_files.id = parents.weather_file_id
     left join lateral (
       select jsonb_build_object('id', runs.id, 'clock', runs.clock, 'figures',
         runs.result - array['demandByMonthHour', 'metByMonthHour', 'supplyCurve', 'aloneHours']) as run
       from runs
       where runs.weather_year_id = weather_years.id and runs.brief_version_id = :briefVersionId
         and runs.method_version = :methodVersion ${atHeight}
       order by runs.made_at desc, runs.id
       limit 1
     ) as newest on true
     where stations.team_id = :teamId ${oneStation}
     order by stations.name, stations.id, weather_years.created_at desc, weather_years.id`,
    { ...asked },
  );
  return rows;
}
