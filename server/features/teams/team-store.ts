import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';

export async function insertTeam(
  transaction: Knex.Transaction,
  team: { name: string; invented: boolean },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    'insert into teams (name, invented) values (:name, :invented) returning id',
    team,
  );
  return rows[0].id;
}

export async function insertMembership(
  db: Knex,
  membership: { teamId: string; personId: string; role: Role },
): Promise<void> {
  await db.raw('insert into memberships (team_id, person_id, role) values (:teamId, :personId, :role)', membership);
}

export async function insertProgramme(
  transaction: Knex.Transaction,
  programme: { teamId: string; name: string },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    'insert into programmes (team_id, name) values (:teamId, :name) returning id',
    programme,
  );
  return rows[0].id;
}
