import type { Knex } from 'knex';
import type { YearKind } from '#engine/reduction/weather-year.ts';

/** An accepted measured year of a station, with its hours of at least so much depression within some months. */
export interface YearDepression {
  readonly stationId: string;
  readonly kind: Exclude<YearKind, 'derived'>;
  readonly year: number | null;
  readonly hours: number;
  /** Hours of the same months whose depression is known. */
  readonly knownHours: number;
}

/** `weather_years.depression_hours` is month-major: at place (month - 1) x 64 + bin + 1, as the engine lays it out. */
const BINS = 64;

/** Of every station of a team; newest file first where years repeat. */
export async function listYearDepressions(
  db: Knex,
  asked: { teamId: string; atLeastK: number; months: readonly number[] },
): Promise<readonly YearDepression[]> {
  const { rows } = await db.raw<{ rows: YearDepression[] }>(
    `select weather_years.station_id as "stationId", weather_years.kind, weather_years.year,
       counted.hours, counted."knownHours"
     from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     cross join lateral (
       select coalesce(sum(bins.hours) filter (where (bins.place - 1) % :bins >= :atLeastK), 0)::integer as hours,
         coalesce(sum(bins.hours), 0)::integer as "knownHours"
       from unnest(weather_years.depression_hours) with ordinality as bins (hours, place)
       where (bins.place - 1) / :bins + 1 = any(:months::integer[])
     ) as counted
     where weather_years.team_id = :teamId and weather_years.kind <> 'derived'
     order by weather_years.station_id, weather_years.created_at desc, weather_years.id`,
    { ...asked, bins: BINS, months: `{${asked.months.join(',')}}` },
  );
  return rows;
}
