import type { Knex } from 'knex';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import { copyRows } from '../../db/copy-rows.ts';
import { bytesOfSlots, type ColumnBytes } from './shared-columns.ts';

/** An accepted weather year with what judging it needs beside its hours. */
export interface YearToRescore {
  readonly stationId: string;
  readonly zone: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
  readonly weatherYearId: string;
  readonly kind: YearKind;
  readonly year: number | null;
  readonly utcOffsetMin: number;
  readonly slots: number;
  readonly contentHash: string;
  /** Hours whose dry bulb and humidity are both as the source measured them. */
  readonly measuredHours: number;
  readonly flagsUniform: boolean;
  /** Which column of the file its humidity was read from. */
  readonly humidityFrom: string;
}

/** Every accepted year of the team's stations, by station name, newest file first: the order of the map. */
export async function listYearsToRescore(db: Knex, teamId: string): Promise<readonly YearToRescore[]> {
  const { rows } = await db.raw<{ rows: YearToRescore[] }>(
    `select stations.id as "stationId", stations.zone, stations.latitude, stations.longitude,
       stations.elevation_m as "elevationM", weather_years.id as "weatherYearId", weather_years.kind, weather_years.year,
       weather_years.utc_offset_min as "utcOffsetMin", weather_years.slots, weather_years.content_hash as "contentHash",
       weather_years.measured_hours as "measuredHours", weather_years.humidity_from as "humidityFrom",
       exists (
         select 1 from findings
         where findings.weather_file_id = weather_files.id and findings.code = 'source-flags-uniform'
       ) as "flagsUniform"
     from stations
     join weather_years on weather_years.team_id = stations.team_id and weather_years.station_id = stations.id
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     where stations.team_id = ?
     order by stations.name, stations.id, weather_years.created_at desc, weather_years.id`,
    [teamId],
  );
  return rows;
}

/** The packed columns of weather years of a team, as they are stored; a year that is not there is left out. */
export async function* copyColumns(
  db: Knex,
  asked: { teamId: string; weatherYearIds: readonly string[]; signal: AbortSignal },
): AsyncGenerator<{ readonly weatherYearId: string; readonly columns: ColumnBytes }> {
  const rows = copyRows(db, {
    query: `select weather_years.id::text, weather_years.dry_bulb, weather_years.humidity_ratio, weather_years.pressure,
       weather_years.flags
     from weather_years
     where weather_years.team_id = ? and weather_years.id = any(?::uuid[])`,
    values: [asked.teamId, `{${asked.weatherYearIds.join(',')}}`],
    signal: asked.signal,
  });
  for await (const [id, dryBulb, humidityRatio, pressure, flags] of rows) {
    if (!id || !dryBulb || !humidityRatio || !pressure || !flags) throw new TypeError('a weather year lacks a column');
    yield { weatherYearId: id.toString('utf8'), columns: { dryBulb, humidityRatio, pressure, flags } };
  }
}

export function bytesOfYear({ slots }: YearToRescore): number {
  return bytesOfSlots(slots);
}
