import type { Knex } from 'knex';
import type { FileStatus, ParentYear, ReadingStep } from '#contract/weather.ts';
import type { Licence } from '#contract/weather-reading.ts';
import type { ClimateDifference } from '#engine/climate/climate-difference.ts';
import type { HumidityRule, MonthlyChange } from '#engine/climate/monthly-change.ts';
import type { YearFacts } from '#engine/reduction/reduce-year.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import type { Ask, Severity } from '#engine/weather-files/finding.ts';
import type { TableGuess } from '#engine/weather-files/table/table-guess.ts';
import type { DeclaredStation } from '#engine/weather-files/weather-file-reading.ts';
import type { FileAnswers } from './file-answers.ts';

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
  readonly licence: Licence;
  readonly attribution: string | null;
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
    weather_files.batch_id as "batchId", weather_files.part, weather_files.licence, weather_files.attribution,
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

/** The files of a station, newest first, each with its year. */
export async function listFilesOfStation(
  db: Knex,
  key: { teamId: string; stationId: string },
): Promise<readonly (WeatherFileView & { readonly weatherYearId: string | null; readonly facts: YearFacts | null })[]> {
  const { rows } = await db.raw<{
    rows: (WeatherFileView & { weatherYearId: string | null; facts: YearFacts | null })[];
  }>(
    `select ${VIEW_COLUMNS}, weather_years.id as "weatherYearId", weather_years.facts ${VIEW_ROWS}
     where weather_files.team_id = :teamId and weather_files.station_id = :stationId
     order by weather_files.uploaded_at desc, weather_files.id desc limit 200`,
    key,
  );
  return rows;
}

/** A weather file's own page. */
export interface WeatherFileRecordView extends WeatherFileView {
  readonly findings: readonly FindingView[];
  readonly asks: readonly Ask[];
  readonly table: TableGuess | null;
  readonly answers: FileAnswers;
  readonly comments: string | null;
  readonly decision: DecisionView | null;
  readonly parts: readonly { readonly fileId: string; readonly part: string; readonly status: FileStatus }[];
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
  readonly lastLine: number | null;
  readonly count: number;
  readonly variable: string | null;
  readonly done: string | null;
  readonly message: string;
}

/** Who refused, withdrew or superseded a file, and why. */
export interface DecisionView {
  readonly by: string;
  readonly at: Date;
  readonly reason: string | null;
  readonly otherFileId: string | null;
}

const FINDINGS = `
  coalesce((
    select jsonb_agg(
      jsonb_build_object('code', findings.code, 'severity', findings.severity, 'line', findings.line,
        'column', findings.col, 'lastLine', findings.last_line, 'count', findings.hours, 'variable', findings.variable,
        'done', findings.done, 'message', findings.message)
      order by findings.position)
    from findings where findings.weather_file_id = weather_files.id
  ), '[]') as findings`;

const PARTS = `
  coalesce((
    select jsonb_agg(jsonb_build_object('fileId', others.id, 'part', others.part, 'status', others.status)
      order by others.part_index)
    from weather_files as others
    where others.team_id = weather_files.team_id and others.fingerprint = weather_files.fingerprint
      and others.uploaded_at = weather_files.uploaded_at and others.id <> weather_files.id
  ), '[]') as parts`;

const DERIVATION = `
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
  ), '[]') as children`;

const DECISION = `
  decider.name as "decidedBy",
  coalesce(weather_files.withdrawn_at, weather_files.superseded_at, weather_files.refused_at) as "decidedAt",
  coalesce(weather_files.withdrawn_reason, weather_files.refused_reason) as "decisionReason",
  weather_files.superseded_by as "otherFileId"`;

type Row = Omit<WeatherFileRecordView, 'decision'> & {
  readonly decidedBy: string | null;
  readonly decidedAt: Date | null;
  readonly decisionReason: string | null;
  readonly otherFileId: string | null;
};

/** One statement, so that status, findings and facts are of one moment; `null` when the team has no such file. */
export async function findWeatherFileRecord(
  db: Knex,
  key: { teamId: string; fileId: string },
): Promise<WeatherFileRecordView | null> {
  const { rows } = await db.raw<{ rows: Row[] }>(
    `select ${VIEW_COLUMNS}, weather_files.asks, weather_files.table_guess as "table", weather_files.answers,
       weather_files.comments, accepter.name as "acceptedBy", weather_years.facts, ${FINDINGS}, ${PARTS}, ${DECISION},
       ${DERIVATION}
     ${VIEW_ROWS}
     left join people as accepter on accepter.id = weather_files.accepted_by
     left join people as decider on decider.id =
       coalesce(weather_files.withdrawn_by, weather_files.superseded_by_person, weather_files.refused_by)
     where weather_files.team_id = ? and weather_files.id = ?`,
    [key.teamId, key.fileId],
  );
  const [row] = rows;
  return row === undefined ? null : { ...row, decision: decisionOf(row) };
}

function decisionOf({ decidedBy: by, decidedAt: at, decisionReason: reason, otherFileId }: Row): DecisionView | null {
  return by === null || at === null ? null : { by, at, reason, otherFileId };
}
