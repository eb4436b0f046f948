import type { Knex } from 'knex';

/** The year of a station that an effect is shown on, with what judging it needs beside its hours. */
export interface ExampleYear {
  readonly weatherYearId: string;
  readonly stationId: string;
  readonly stationName: string;
  readonly zone: string;
  readonly latitude: number;
  readonly longitude: number;
  readonly elevationM: number;
}

/** The newest typical year, else the latest actual one, never a derived one; `null` when no such year is accepted. */
export async function findExampleYear(
  db: Knex,
  key: { teamId: string; programmeId: string; stationId: string },
): Promise<ExampleYear | null> {
  const { rows } = await db.raw<{ rows: ExampleYear[] }>(
    `select weather_years.id as "weatherYearId", stations.id as "stationId", stations.name as "stationName",
       stations.zone, stations.latitude, stations.longitude, stations.elevation_m as "elevationM"
     from programmes
     join stations on stations.team_id = programmes.team_id and stations.id = :stationId
     join weather_years on weather_years.team_id = stations.team_id and weather_years.station_id = stations.id
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     where programmes.team_id = :teamId and programmes.id = :programmeId and weather_years.kind <> 'derived'
     order by case weather_years.kind when 'typical' then 0 else 1 end,
       weather_years.year desc nulls last, weather_years.created_at desc, weather_years.id
     limit 1`,
    key,
  );
  return rows[0] ?? null;
}
