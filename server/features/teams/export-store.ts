import type { Knex } from 'knex';

interface ExportKey {
  readonly teamId: string;
  readonly exportId: string;
}

/** @returns the id of the export that is being made now: a new one, unless one was being made already; and whether it is new */
export async function insertExport(
  transaction: Knex.Transaction,
  asked: { teamId: string; personId: string; at: Date },
): Promise<{ exportId: string; isNew: boolean }> {
  const { rows } = await transaction.raw<{ rows: [{ id: string; new: boolean }] }>(
    `with made as (
       insert into team_exports (team_id, asked_by, asked_at) values (:teamId, :personId, :at)
       on conflict (team_id) where state = 'making' do nothing
       returning id
     )
     select made.id, true as new from made
     union all
     select team_exports.id, false from team_exports
     where team_exports.team_id = :teamId and team_exports.state = 'making' and not exists (select 1 from made)`,
    asked,
  );
  return { exportId: rows[0].id, isNew: rows[0].new };
}

export interface ExportToMake {
  readonly askedBy: string;
  readonly teamName: string;
}

/** Null when it is not being made (any more). */
export async function findExportToMake(db: Knex, key: ExportKey): Promise<ExportToMake | null> {
  const { rows } = await db.raw<{ rows: ExportToMake[] }>(
    `select team_exports.asked_by as "askedBy", teams.name as "teamName"
     from team_exports join teams on teams.id = team_exports.team_id
     where team_exports.team_id = :teamId and team_exports.id = :exportId and team_exports.state = 'making'`,
    { ...key },
  );
  return rows[0] ?? null;
}

export async function setExportProgress(
  db: Knex,
  progress: ExportKey & { parts: number; partsDone: number },
): Promise<void> {
  await db.raw(
    'update team_exports set parts = :parts, parts_done = :partsDone where team_id = :teamId and id = :exportId',
    { ...progress },
  );
}

/** @returns false when it was ended meanwhile */
export async function setExportReady(
  transaction: Knex.Transaction,
  ready: ExportKey & { bytes: number; storageKey: string; at: Date; expiresAt: Date },
): Promise<boolean> {
  const { rowCount } = await transaction.raw<{ rowCount: number }>(
    `update team_exports set state = 'ready', parts_done = parts, bytes = :bytes, storage_key = :storageKey,
       ready_at = :at, expires_at = :expiresAt
     where team_id = :teamId and id = :exportId and state = 'making'`,
    { ...ready },
  );
  return rowCount > 0;
}

export async function setExportFailed(db: Knex, key: ExportKey): Promise<void> {
  await db.raw(
    `update team_exports set state = 'failed' where team_id = :teamId and id = :exportId and state = 'making'`,
    { ...key },
  );
}

/** Ends the exports whose time is over. @returns the keys under which their archives were kept */
export async function endExpiredExports(db: Knex, at: Date): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { key: string }[] }>(
    `update team_exports set state = 'over', storage_key = null
     from (select id, storage_key from team_exports where state = 'ready' and expires_at <= ? for update) as ended
     where ended.id = team_exports.id returning ended.storage_key as key`,
    [at],
  );
  return rows.map(({ key }) => key);
}
