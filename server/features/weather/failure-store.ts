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
     left join weather_batches on weather_batches.id = weather_files.batch_id
     where weather_files.status = 'reading' and weather_files.failure is null
       and weather_batches.state is distinct from 'paused'
       and not exists (
         select 1 from graphile_worker.jobs
         where jobs.key = weather_files.id::text and (jobs.attempts < jobs.max_attempts or jobs.locked_at is not null))`,
  );
  return rows;
}

/** The year of an accepted file. */
export async function findYearOfFile(db: Knex, key: { teamId: string; fileId: string }): Promise<string | null> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select weather_years.id from weather_years
     join weather_files on weather_files.id = weather_years.weather_file_id and weather_files.status = 'accepted'
     where weather_years.team_id = :teamId and weather_years.weather_file_id = :fileId`,
    key,
  );
  return rows[0]?.id ?? null;
}

/** Archives that wait or are being opened without a job that would do it. */
export async function findStrandedArchives(db: Knex): Promise<readonly { teamId: string; archiveId: string }[]> {
  const { rows } = await db.raw<{ rows: { teamId: string; archiveId: string }[] }>(
    `select weather_archives.team_id as "teamId", weather_archives.id as "archiveId"
     from weather_archives
     join weather_batches on weather_batches.id = weather_archives.batch_id and weather_batches.state = 'running'
     where weather_archives.status in ('waiting', 'opening') and weather_archives.failure is null
       and not exists (
         select 1 from graphile_worker.jobs
         where jobs.key = weather_archives.id::text
           and (jobs.attempts < jobs.max_attempts or jobs.locked_at is not null))`,
  );
  return rows;
}
