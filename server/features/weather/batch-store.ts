import type { Knex } from 'knex';
import type { ArchiveStatus, BatchState } from '#contract/weather-batches.ts';
import { storableText } from './storable-text.ts';

export interface BatchKey {
  readonly teamId: string;
  readonly batchId: string;
}

export async function insertBatch(
  transaction: Knex.Transaction,
  batch: { teamId: string; name: string; personId: string; at: Date },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into weather_batches (team_id, name, made_by, made_at) values (:teamId, :name, :personId, :at) returning id`,
    { ...batch, name: storableText(batch.name) },
  );
  return rows[0].id;
}

/** The state of a batch, held until the transaction ends; null when the team has no such batch. */
export async function lockBatch(transaction: Knex.Transaction, key: BatchKey): Promise<BatchState | null> {
  const { rows } = await transaction.raw<{ rows: { state: BatchState }[] }>(
    'select state from weather_batches where team_id = :teamId and id = :batchId for no key update',
    { ...key },
  );
  return rows[0]?.state ?? null;
}

/** The same for who only must not see it change under them: many uploads into one batch go on side by side. */
export async function shareBatch(transaction: Knex.Transaction, key: BatchKey): Promise<BatchState | null> {
  const { rows } = await transaction.raw<{ rows: { state: BatchState }[] }>(
    'select state from weather_batches where team_id = :teamId and id = :batchId for key share',
    { ...key },
  );
  return rows[0]?.state ?? null;
}

export async function findBatchState(db: Knex, key: BatchKey): Promise<BatchState | null> {
  const { rows } = await db.raw<{ rows: { state: BatchState }[] }>(
    'select state from weather_batches where team_id = :teamId and id = :batchId',
    { ...key },
  );
  return rows[0]?.state ?? null;
}

export async function setBatchState(
  transaction: Knex.Transaction,
  change: BatchKey & { state: BatchState; personId: string; at: Date },
): Promise<void> {
  await transaction.raw(
    `update weather_batches set state = :state, changed_by = :personId, changed_at = :at
     where team_id = :teamId and id = :batchId`,
    { ...change },
  );
}

/** Files of a batch whose reading has not ended. */
export async function findUnreadFiles(db: Knex, key: BatchKey): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select id from weather_files
     where team_id = :teamId and batch_id = :batchId and status = 'reading' and failure is null`,
    { ...key },
  );
  return rows.map(({ id }) => id);
}

/** Withdraws the files of a batch that have not been read. @returns their ids */
export async function withdrawUnreadFiles(
  transaction: Knex.Transaction,
  change: BatchKey & { personId: string; at: Date; reason: string },
): Promise<readonly string[]> {
  const { rows } = await transaction.raw<{ rows: { id: string }[] }>(
    `update weather_files
     set status = 'withdrawn', step = null, withdrawn_by = :personId, withdrawn_at = :at, withdrawn_reason = :reason
     where team_id = :teamId and batch_id = :batchId and status = 'reading'
     returning id`,
    { ...change },
  );
  return rows.map(({ id }) => id);
}

export interface LeftOut {
  readonly path: string;
  readonly why: string;
}

export interface ArchiveState {
  readonly id: string;
  readonly teamId: string;
  readonly batchId: string;
  readonly batchState: BatchState;
  readonly name: string;
  readonly fingerprint: string;
  readonly storageKey: string;
  readonly status: ArchiveStatus;
  /** Where opening goes on: the entries before it are done. */
  readonly nextEntry: number;
  readonly opened: number;
  readonly leftOut: readonly LeftOut[];
  readonly failure: string | null;
  /** Who uploaded it, in whose name its files are received. */
  readonly madeBy: string;
}

const ARCHIVE = `
  select weather_archives.id, weather_archives.team_id as "teamId", weather_archives.batch_id as "batchId",
    weather_batches.state as "batchState", weather_archives.name, weather_archives.fingerprint,
    weather_archives.storage_key as "storageKey", weather_archives.status,
    weather_archives.next_entry as "nextEntry", weather_archives.members_opened as opened,
    weather_archives.left_out as "leftOut", weather_archives.failure,
    weather_batches.made_by as "madeBy"
  from weather_archives join weather_batches on weather_batches.id = weather_archives.batch_id`;

export async function findArchive(db: Knex, key: { teamId: string; archiveId: string }): Promise<ArchiveState | null> {
  const { rows } = await db.raw<{ rows: ArchiveState[] }>(
    `${ARCHIVE} where weather_archives.team_id = :teamId and weather_archives.id = :archiveId`,
    key,
  );
  return rows[0] ?? null;
}

/** Archives of a batch that have not been opened whole. */
export async function findUnopenedArchives(db: Knex, key: BatchKey): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select id from weather_archives
     where team_id = :teamId and batch_id = :batchId and status in ('waiting', 'opening') and failure is null`,
    { ...key },
  );
  return rows.map(({ id }) => id);
}

export async function insertArchive(
  transaction: Knex.Transaction,
  archive: BatchKey & { name: string; bytes: number; fingerprint: string; storageKey: string },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into weather_archives (team_id, batch_id, name, bytes, fingerprint, storage_key)
     values (:teamId, :batchId, :name, :bytes, :fingerprint, :storageKey) returning id`,
    { ...archive, name: storableText(archive.name) },
  );
  return rows[0].id;
}

/** Begins the opening, also one that was broken off. @returns false when it has ended already */
export async function setArchiveOpening(
  db: Knex,
  archive: { teamId: string; archiveId: string; members: number },
): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    `update weather_archives set status = 'opening', members = :members
     where team_id = :teamId and id = :archiveId and status in ('waiting', 'opening')`,
    archive,
  );
  return result.rowCount > 0;
}

/** Some entries further. @returns false when the archive is not being opened any more */
export async function setArchiveProgress(
  db: Knex,
  progress: {
    teamId: string;
    archiveId: string;
    nextEntry: number;
    opened: number;
    leftOut: readonly LeftOut[];
  },
): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    `update weather_archives set next_entry = :nextEntry, members_opened = :opened, left_out = cast(:leftOut as jsonb)
     where team_id = :teamId and id = :archiveId and status = 'opening'`,
    {
      ...progress,
      leftOut: JSON.stringify(progress.leftOut.map(({ path, why }) => ({ path: storableText(path), why }))),
    },
  );
  return result.rowCount > 0;
}

export async function endArchive(
  db: Knex,
  end: { teamId: string; archiveId: string; status: 'opened' | 'refused' | 'waiting'; problem: string | null },
): Promise<void> {
  await db.raw(
    `update weather_archives set status = :status, problem = :problem
     where team_id = :teamId and id = :archiveId and status in ('waiting', 'opening')`,
    end,
  );
}

export async function cancelArchives(transaction: Knex.Transaction, key: BatchKey): Promise<void> {
  await transaction.raw(
    `update weather_archives set status = 'cancelled', failure = null
     where team_id = :teamId and batch_id = :batchId and status in ('waiting', 'opening')`,
    { ...key },
  );
}

/** Writes on an archive why its opening was given up, or takes that away again. */
export async function setArchiveFailure(
  db: Knex,
  failure: { teamId: string; archiveId: string; message: string | null },
): Promise<string | null> {
  const { rows } = await db.raw<{ rows: { batchId: string }[] }>(
    `update weather_archives set failure = :message, status = 'waiting'
     where team_id = :teamId and id = :archiveId and status in ('waiting', 'opening')
     returning batch_id as "batchId"`,
    failure,
  );
  return rows[0]?.batchId ?? null;
}
