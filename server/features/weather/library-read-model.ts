import type { Knex } from 'knex';
import type { LibrarySort, LibraryStatus } from '#contract/weather-library.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import { VIEW_COLUMNS, VIEW_ROWS, type WeatherFileView } from './weather-file-read-model.ts';

/** What of the library is asked for. */
export interface LibraryPage {
  readonly teamId: string;
  readonly status?: LibraryStatus | undefined;
  readonly text?: string | undefined;
  readonly format?: string | undefined;
  readonly kind?: YearKind | undefined;
  readonly batchId?: string | undefined;
  readonly stationId?: string | undefined;
  readonly sort: LibrarySort;
  readonly order: 'asc' | 'desc';
  readonly page: number;
  readonly limit: number;
}

/** What stands in the order of each sort; the newest first among equals. */
const SORT: Readonly<Record<LibrarySort, string>> = {
  uploaded: 'weather_files.uploaded_at',
  name: 'lower(weather_files.name)',
  station: `lower(coalesce(stations.name, weather_files.declared_station ->> 'name'))`,
  complete: `1 - (weather_years.facts ->> 'missing')::double precision / weather_years.slots`,
};

/** One page of the team's files that the filter leaves, and how many it leaves. */
export async function listWeatherFileViews(
  db: Knex,
  page: LibraryPage,
): Promise<{ views: readonly WeatherFileView[]; total: number }> {
  const { where, values } = filterOf(page);
  const direction = page.order === 'asc' ? 'asc nulls last' : 'desc nulls last';
  const from = `${VIEW_ROWS} left join stations on stations.id = weather_files.station_id`;
  const [listed, counted] = await Promise.all([
    db.raw<{ rows: WeatherFileView[] }>(
      `select ${VIEW_COLUMNS} ${from} where ${where}
       order by ${SORT[page.sort]} ${direction}, weather_files.uploaded_at desc, weather_files.id desc
       limit :limit offset :skipped`,
      { ...values, limit: page.limit, skipped: (page.page - 1) * page.limit },
    ),
    db.raw<{ rows: [{ total: number }] }>(
      `select count(*)::integer as total
       from weather_files
       left join weather_years on weather_years.weather_file_id = weather_files.id
       left join stations on stations.id = weather_files.station_id
       where ${where}`,
      values,
    ),
  ]);
  return { views: listed.rows, total: counted.rows[0].total };
}

function filterOf(page: LibraryPage): { where: string; values: Record<string, string> } {
  const { teamId, status, text, format, kind, batchId, stationId } = page;
  const parts = ['weather_files.team_id = :teamId'];
  const values: Record<string, string> = { teamId };
  const narrow = (part: string, name: string, value: string | undefined): void => {
    if (value === undefined || value === '') return;
    parts.push(part);
    values[name] = value;
  };
  if (status === 'stopped') parts.push('weather_files.failure is not null');
  else narrow('weather_files.status = :status', 'status', status);
  narrow('weather_files.format = :format', 'format', format);
  narrow('weather_years.kind = :kind', 'kind', kind);
  narrow('weather_files.batch_id = cast(:batchId as uuid)', 'batchId', batchId);
  narrow('weather_files.station_id = cast(:stationId as uuid)', 'stationId', stationId);
  narrow(TEXT, 'pattern', text === undefined || text === '' ? undefined : `%${escapeLike(text)}%`);
  return { where: parts.join(' and '), values };
}

const TEXT = `(weather_files.name ilike :pattern or stations.name ilike :pattern
  or weather_files.declared_station ->> 'name' ilike :pattern or weather_files.declared_station ->> 'wmoNumber' ilike :pattern)`;

/** The characters that a pattern gives a meaning stand for themselves. */
function escapeLike(text: string): string {
  return text.replace(/[\\%_]/g, (character) => `\\${character}`);
}

/** Files of the whole team by status, those that stopped, and the formats that occur. */
export async function countLibrary(
  db: Knex,
  teamId: string,
): Promise<{ counts: Record<LibraryStatus, number>; formats: readonly string[] }> {
  const { rows } = await db.raw<{
    rows: { status: LibraryStatus; number: number; stopped: number; formats: (string | null)[] }[];
  }>(
    `select status, count(*)::integer as number, count(failure)::integer as stopped,
       jsonb_agg(distinct format) as formats
     from weather_files where team_id = ? group by status`,
    [teamId],
  );
  const formats = new Set(rows.flatMap((row) => row.formats.filter((format) => format !== null)));
  const counts = { ...NONE, stopped: rows.reduce((sum, { stopped }) => sum + stopped, 0) };
  for (const { status, number } of rows) counts[status] = number;
  return { counts, formats: [...formats].sort() };
}

const NONE: Readonly<Record<LibraryStatus, number>> = {
  reading: 0,
  asks: 0,
  review: 0,
  accepted: 0,
  refused: 0,
  withdrawn: 0,
  superseded: 0,
  stopped: 0,
};
