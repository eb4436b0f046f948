import type { Knex } from 'knex';

/** @returns false when the file is no longer being read */
export async function setReadingFailure(
  transaction: Knex.Transaction,
  failure: { teamId: string; fileId: string; message: string },
): Promise<boolean> {
  const result = await transaction.raw<{ rowCount: number }>(
    `update weather_files set step = null, failure = :message
     where team_id = :teamId and id = :fileId and status = 'reading'`,
    failure,
  );
  return result.rowCount > 0;
}

/** @returns the file of the year; null when it no longer counts */
export async function setJudgingFailure(
  transaction: Knex.Transaction,
  failure: { teamId: string; weatherYearId: string; message: string },
): Promise<string | null> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `update weather_files set failure = :message
     from weather_years
     where weather_years.team_id = :teamId and weather_years.id = :weatherYearId
       and weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     returning weather_files.id`,
    failure,
  );
  return rows[0]?.id ?? null;
}

export async function unsetJudgingFailure(db: Knex, key: { teamId: string; weatherYearId: string }): Promise<void> {
  await db.raw(
    `update weather_files set failure = null
     from weather_years
     where weather_years.team_id = :teamId and weather_years.id = :weatherYearId
       and weather_files.id = weather_years.weather_file_id
       and weather_files.status = 'accepted' and weather_files.failure is not null`,
    key,
  );
}

/** Files in reading whose job is neither waiting nor at work. */
export async function findStrandedFiles(db: Knex): Promise<readonly { teamId: string; fileId: string }[]> {
  const { rows } = await db.raw<{ rows: { teamId: string; fileId: string }[] }>(
    `select weather_files.team_id as "teamId", weather_files.id as "fileId"
     from weather_files
     where weather_files.status = 'reading' and weather_files.failure is null
       and not exists (
         select 1 from graphile_worker.jobs
         where jobs.key = weather_files.id::text and (jobs.attempts < jobs.max_attempts or jobs.locked_at is not null))`,
  );
  return rows;
}
