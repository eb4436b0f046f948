import type { Knex } from 'knex';
import type { FileStatus, ParentYear, ReadingStep } from '#contract/weather.ts';
import type { ClimateDifference } from '#engine/climate/climate-difference.ts';
import type { HumidityRule, MonthlyChange } from '#engine/climate/monthly-change.ts';
import type { YearFacts } from '#engine/reduction/reduce-year.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import type { Ask, Severity } from '#engine/weather-files/finding.ts';
import type { DeclaredStation } from '#engine/weather-files/weather-file-reading.ts';

/** A weather file as the library shows it. */
export interface WeatherFileView {
  readonly id: string;
  readonly name: string;
  readonly bytes: number;
  readonly fingerprint: string;
  readonly format: string | null;
  readonly status: FileStatus;
  readonly step: ReadingStep | null;
  readonly failure: string | null;
  readonly uploadedBy: string;
  readonly uploadedAt: Date;
  readonly declaredStation: DeclaredStation | null;
  readonly stationId: string | null;
  readonly kind: YearKind | null;
  readonly year: number | null;
  readonly hours: number | null;
  readonly missing: number | null;
  readonly batchId: string | null;
  readonly part: string;
  readonly findingCounts: Readonly<Partial<Record<Severity, number>>>;
  /** Of a derived year. */
  readonly parent: ParentYear | null;
}

/** Columns and rows of a view; statements of this feature alone build on them. */
export const VIEW_COLUMNS = `
    weather_files.id, weather_files.name, weather_files.bytes::double precision as bytes, weather_files.fingerprint,
    weather_files.format, weather_files.status, weather_files.step, weather_files.failure,
    people.name as "uploadedBy", weather_files.uploaded_at as "uploadedAt",
    weather_files.declared_station as "declaredStation", weather_files.station_id as "stationId",
    weather_years.kind, weather_years.year, weather_years.slots as hours,
    (weather_years.facts ->> 'missing')::integer as missing,
    weather_files.batch_id as "batchId", weather_files.part,
    coalesce(counts.by_severity, '{}') as "findingCounts", parents.parent`;
export const VIEW_ROWS = `
  from weather_files
  join people on people.id = weather_files.uploaded_by
  left join weather_years on weather_years.weather_file_id = weather_files.id
  left join derived_years on derived_years.weather_year_id = weather_years.id
  left join lateral (
    select jsonb_build_object('fileId', files.id, 'name', files.name, 'status', files.status,
      'kind', years.kind, 'year', years.year) as parent
    from weather_years as years
    join weather_files as files on files.id = years.weather_file_id
    where years.id = derived_years.parent_year_id
  ) as parents on true
  left join lateral (
    select jsonb_object_agg(each.severity, each.number) as by_severity
    from (
      select findings.severity, count(*) as number from findings
      where findings.weather_file_id = weather_files.id
      group by findings.severity
    ) as each
  ) as counts on true`;

/** `null` when the team has no such file. */
export async function findWeatherFileView(
  db: Knex,
  key: { teamId: string; fileId: string },
): Promise<WeatherFileView | null> {
  const { rows } = await db.raw<{ rows: WeatherFileView[] }>(
    `select ${VIEW_COLUMNS} ${VIEW_ROWS} where weather_files.team_id = ? and weather_files.id = ?`,
    [key.teamId, key.fileId],
  );
  return rows[0] ?? null;
}

/** A weather file's own page. */
export interface WeatherFileRecordView extends WeatherFileView {
  readonly findings: readonly FindingView[];
  readonly asks: readonly Ask[];
  readonly acceptedBy: string | null;
  readonly facts: YearFacts | null;
  readonly derivation: {
    readonly humidityRule: HumidityRule;
    readonly monthly: readonly MonthlyChange[];
    readonly cappedHours: number;
    readonly difference: ClimateDifference;
  } | null;
  /** Years derived from this one, newest first. */
  readonly children: readonly { readonly fileId: string; readonly name: string; readonly status: FileStatus }[];
}

export interface FindingView {
  readonly code: string;
  readonly severity: Severity;
  readonly line: number | null;
  readonly column: number | null;
  readonly message: string;
}

/** One statement, so that status, findings and facts are of one moment; `null` when the team has no such file. */
export async function findWeatherFileRecord(
  db: Knex,
  key: { teamId: string; fileId: string },
): Promise<WeatherFileRecordView | null> {
  const { rows } = await db.raw<{ rows: WeatherFileRecordView[] }>(
    `select ${VIEW_COLUMNS}, weather_files.asks, accepter.name as "acceptedBy", weather_years.facts,
       coalesce((
         select jsonb_agg(
           jsonb_build_object('code', findings.code, 'severity', findings.severity, 'line', findings.line,
             'column', findings.col, 'message', findings.message)
           order by findings.position)
         from findings where findings.weather_file_id = weather_files.id
       ), '[]') as findings,
       case when derived_years.weather_year_id is not null then
         jsonb_build_object('humidityRule', derived_years.humidity_rule, 'monthly', derived_years.monthly,
           'cappedHours', derived_years.capped_hours, 'difference', derived_years.difference)
       end as derivation,
       coalesce((
         select jsonb_agg(
           jsonb_build_object('fileId', files.id, 'name', files.name, 'status', files.status)
           order by files.uploaded_at desc, files.id)
         from derived_years as made
         join weather_years as years on years.id = made.weather_year_id
         join weather_files as files on files.id = years.weather_file_id
         where made.team_id = weather_files.team_id and made.parent_year_id = weather_years.id
       ), '[]') as children
     ${VIEW_ROWS}
     left join people as accepter on accepter.id = weather_files.accepted_by
     where weather_files.team_id = ? and weather_files.id = ?`,
    [key.teamId, key.fileId],
  );
  return rows[0] ?? null;
}
