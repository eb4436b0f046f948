import type { Knex } from 'knex';

/** The packed columns of a file's year in the order in which they are sent; null when the team has no such year. */
export async function findFileColumns(
  db: Knex,
  key: { teamId: string; fileId: string },
): Promise<readonly Buffer[] | null> {
  const { rows } = await db.raw<{
    rows: { dryBulb: Buffer; humidityRatio: Buffer; pressure: Buffer; flags: Buffer }[];
  }>(
    `select dry_bulb as "dryBulb", humidity_ratio as "humidityRatio", pressure, flags
     from weather_years where team_id = :teamId and weather_file_id = :fileId`,
    key,
  );
  const [year] = rows;
  return year === undefined ? null : [year.dryBulb, year.humidityRatio, year.pressure, year.flags];
}
