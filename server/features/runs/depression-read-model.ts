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

/** Of every station of a team; newest file first where years repeat. */
export async function listYearDepressions(
  db: Knex,
  asked: { teamId: string; atLeastK: number; months: readonly number[] },
): Promise<readonly YearDepression[]> {
  const { rows } = await db.raw<{ rows: YearDepression[] }>(
    `select weather_years.station_id as "stationId", weather_years.kind, weather_years.year,
       coalesce(sum(depression_hours.hours) filter (where depression_hours.bin_k >= :atLeastK), 0)::integer as hours,
       coalesce(sum(depression_hours.hours), 0)::integer as "knownHours"
     from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     left join depression_hours
       on depression_hours.weather_year_id = weather_years.id and depression_hours.month = any(:months::integer[])
     where weather_years.team_id = :teamId and weather_years.kind <> 'derived'
     group by weather_years.id
     order by weather_years.station_id, weather_years.created_at desc, weather_years.id`,
    { ...asked, months: `{${asked.months.join(',')}}` },
  );
  return rows;
}
