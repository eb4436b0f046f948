import type { Knex } from 'knex';

export interface FinishedBatch {
  readonly teamId: string;
  readonly batchId: string;
  readonly name: string;
  readonly personId: string;
}

/**
 * Batches in which nothing is left to read, and whose last file came long enough ago that no more are on their way; each is
 * answered once, whichever worker asks.
 */
export async function takeFinishedBatches(
  transaction: Knex.Transaction,
  { at, restSeconds }: { at: Date; restSeconds: number },
): Promise<readonly FinishedBatch[]> {
  const { rows } = await transaction.raw<{ rows: FinishedBatch[] }>(
    `with finished as (
       select weather_batches.id from weather_batches
       where weather_batches.told_at is null and weather_batches.state = 'running'
         and exists (select 1 from weather_files where weather_files.batch_id = weather_batches.id)
         and not exists (
           select 1 from weather_files where weather_files.batch_id = weather_batches.id and (
             (weather_files.status = 'reading' and weather_files.failure is null)
             or weather_files.uploaded_at > cast(:at as timestamptz) - make_interval(secs => :restSeconds)))
         and not exists (
           select 1 from weather_archives where weather_archives.batch_id = weather_batches.id
             and weather_archives.status in ('waiting', 'opening') and weather_archives.failure is null)
       for no key update skip locked
     )
     update weather_batches set told_at = :at from finished
     where weather_batches.id = finished.id
     returning weather_batches.team_id as "teamId", weather_batches.id as "batchId", weather_batches.name,
       weather_batches.made_by as "personId"`,
    { at, restSeconds },
  );
  return rows;
}
