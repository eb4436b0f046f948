import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';

/** One change of a team's people at a time, so that two leads who leave at once cannot both count the other. */
export async function lockTeam(transaction: Knex.Transaction, teamId: string): Promise<void> {
  await transaction.raw('select 1 from teams where id = ? for update', [teamId]);
}

export interface StoredMember {
  readonly role: Role;
  readonly endsAt: Date | null;
}

export async function findMember(db: Knex, key: { teamId: string; personId: string }): Promise<StoredMember | null> {
  const { rows } = await db.raw<{ rows: StoredMember[] }>(
    `select memberships.role, memberships.ends_at as "endsAt" from memberships
     where memberships.team_id = :teamId and memberships.person_id = :personId`,
    key,
  );
  return rows[0] ?? null;
}

export async function countOtherLeads(db: Knex, key: { teamId: string; personId: string }): Promise<number> {
  const { rows } = await db.raw<{ rows: [{ leads: number }] }>(
    `select count(*)::integer as leads from memberships
     where team_id = :teamId and role = 'lead' and person_id <> :personId`,
    key,
  );
  return rows[0].leads;
}

export async function updateMember(
  db: Knex,
  change: { teamId: string; personId: string; role: Role; endsAt: Date | null },
): Promise<void> {
  await db.raw(
    'update memberships set role = :role, ends_at = :endsAt where team_id = :teamId and person_id = :personId',
    change,
  );
}

export async function deleteMember(db: Knex, key: { teamId: string; personId: string }): Promise<void> {
  await db.raw('delete from memberships where team_id = :teamId and person_id = :personId', key);
}

/** Takes the place of a membership from outside whose time is over. */
export async function putMember(
  db: Knex,
  member: { teamId: string; personId: string; role: Role; endsAt: Date | null; at: Date },
): Promise<void> {
  await db.raw(
    `insert into memberships (team_id, person_id, role, ends_at, since) values (:teamId, :personId, :role, :endsAt, :at)
     on conflict (team_id, person_id) do update set role = :role, ends_at = :endsAt, since = :at`,
    member,
  );
}

export async function setTeamName(db: Knex, change: { teamId: string; name: string }): Promise<void> {
  await db.raw('update teams set name = :name where id = :teamId', change);
}

/** Ends every session of a person. @returns how many */
export async function deleteSessionsOf(db: Knex, personId: string): Promise<number> {
  const result = await db.raw<{ rowCount: number }>('delete from sessions where person_id = ?', [personId]);
  return result.rowCount;
}
