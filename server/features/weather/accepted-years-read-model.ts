import type { Knex } from 'knex';

/** Every weather year of the team that counts, oldest first. */
export async function listAcceptedYearIds(db: Knex, teamId: string): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select weather_years.id
     from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     where weather_years.team_id = ? and weather_years.station_id is not null
     order by weather_years.created_at, weather_years.id`,
    [teamId],
  );
  return rows.map(({ id }) => id);
}
