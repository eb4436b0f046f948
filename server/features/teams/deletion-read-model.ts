import type { Knex } from 'knex';

export interface DeletionView {
  readonly askedBy: string;
  readonly askedAt: Date;
  readonly endsAt: Date;
}

/** The deletion that waits for its time; null when there is none. */
export async function findWaitingDeletion(db: Knex, teamId: string): Promise<DeletionView | null> {
  const { rows } = await db.raw<{ rows: DeletionView[] }>(
    `select people.name as "askedBy", team_deletions.asked_at as "askedAt", team_deletions.ends_at as "endsAt"
     from team_deletions join people on people.id = team_deletions.asked_by
     where team_deletions.team_id = ? and team_deletions.stopped_at is null and team_deletions.ended_at is null`,
    [teamId],
  );
  return rows[0] ?? null;
}

/** Everybody who leads the team. */
export async function listLeadIds(db: Knex, teamId: string): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select memberships.person_id as id from memberships
     where memberships.team_id = ? and memberships.role = 'lead' order by memberships.person_id`,
    [teamId],
  );
  return rows.map(({ id }) => id);
}

export async function findTeamName(db: Knex, teamId: string): Promise<string> {
  const { rows } = await db.raw<{ rows: { name: string }[] }>('select name from teams where id = ?', [teamId]);
  return rows[0]?.name ?? '';
}
