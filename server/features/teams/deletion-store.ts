import type { Knex } from 'knex';

/** @returns false when one waits already */
export async function insertDeletion(
  transaction: Knex.Transaction,
  deletion: { teamId: string; teamName: string; personId: string; at: Date; endsAt: Date },
): Promise<boolean> {
  const { rowCount } = await transaction.raw<{ rowCount: number }>(
    `insert into team_deletions (team_id, team_name, asked_by, asked_at, ends_at)
     values (:teamId, :teamName, :personId, :at, :endsAt)
     on conflict (team_id) where stopped_at is null do nothing`,
    { ...deletion },
  );
  return rowCount > 0;
}

/** @returns false when none waits */
export async function setDeletionStopped(
  transaction: Knex.Transaction,
  stop: { teamId: string; personId: string; at: Date },
): Promise<boolean> {
  const { rowCount } = await transaction.raw<{ rowCount: number }>(
    `update team_deletions set stopped_by = :personId, stopped_at = :at
     where team_id = :teamId and stopped_at is null and ended_at is null`,
    { ...stop },
  );
  return rowCount > 0;
}

export interface DueDeletion {
  readonly teamId: string;
  readonly teamName: string;
  readonly askedBy: string;
}

/** Teams whose time is over, and those that ended while their originals were not all seen to. */
export async function listDueDeletions(db: Knex): Promise<readonly { teamId: string }[]> {
  const { rows } = await db.raw<{ rows: { teamId: string }[] }>(
    `select team_deletions.team_id as "teamId" from team_deletions
     where team_deletions.stopped_at is null
       and ((team_deletions.ended_at is null and team_deletions.ends_at <= now()) or team_deletions.originals is not null)`,
  );
  return rows;
}

/** Locks the deletion whose time is over; null when there is none (any more). */
export async function takeDueDeletion(transaction: Knex.Transaction, teamId: string): Promise<DueDeletion | null> {
  const { rows } = await transaction.raw<{ rows: DueDeletion[] }>(
    `select team_deletions.team_id as "teamId", team_deletions.team_name as "teamName", team_deletions.asked_by as "askedBy"
     from team_deletions
     where team_deletions.team_id = ? and team_deletions.stopped_at is null and team_deletions.ended_at is null
       and team_deletions.ends_at <= now()
     for update`,
    [teamId],
  );
  return rows[0] ?? null;
}

/** Empties every table of the team's rows: see the migration that made the function. */
export async function deleteTeamRows(transaction: Knex.Transaction, teamId: string): Promise<void> {
  await transaction.raw('select end_team(?)', [teamId]);
}

/** Keys that the rows of an ended team named and that have not been seen to. */
export async function listKeysLeft(db: Knex, teamId: string): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { keys: string[] | null }[] }>(
    `select team_deletions.originals as keys from team_deletions
     where team_deletions.team_id = ? and team_deletions.ended_at is not null`,
    [teamId],
  );
  return rows[0]?.keys ?? [];
}

export async function setKeysSeenTo(db: Knex, teamId: string): Promise<void> {
  await db.raw('update team_deletions set originals = null where team_id = ? and ended_at is not null', [teamId]);
}
