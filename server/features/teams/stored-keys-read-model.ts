import type { Knex } from 'knex';

/** Whether a row of any team names this key of the store of originals. */
export async function isKeyUsed(db: Knex, key: string): Promise<boolean> {
  const { rows } = await db.raw<{ rows: [{ used: boolean }] }>(
    `select exists (select 1 from weather_files where weather_files.storage_key = :key)
       or exists (select 1 from weather_archives where weather_archives.storage_key = :key)
       or exists (select 1 from team_exports where team_exports.storage_key = :key) as used`,
    { key },
  );
  return rows[0].used;
}
