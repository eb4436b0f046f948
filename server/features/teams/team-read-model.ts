import type { Knex } from 'knex';
import type { Membership, Role } from '#contract/accounts.ts';

/** The person's teams, each with the person's role and the team's programmes, by name. */
export async function listMemberships(db: Knex, personId: string): Promise<Membership[]> {
  const { rows } = await db.raw<{ rows: Membership[] }>(
    `select teams.id as "teamId", teams.name as "teamName", memberships.role, teams.invented,
       coalesce(
         (select json_agg(json_build_object('id', programmes.id, 'name', programmes.name) order by programmes.name, programmes.id)
          from programmes where programmes.team_id = teams.id),
         '[]'::json) as programmes
     from memberships
     join teams on teams.id = memberships.team_id
     where memberships.person_id = ?
     order by teams.name, teams.id`,
    [personId],
  );
  return rows;
}

/** Role by team; `null` when there is no such person. */
export async function findRoles(db: Knex, personId: string): Promise<ReadonlyMap<string, Role> | null> {
  const { rows } = await db.raw<{ rows: { teamId: string | null; role: Role | null }[] }>(
    `select memberships.team_id as "teamId", memberships.role
     from people
     left join memberships on memberships.person_id = people.id
     where people.id = ?`,
    [personId],
  );
  if (rows.length === 0) return null;
  return new Map(rows.flatMap(({ teamId, role }) => (teamId === null || role === null ? [] : [[teamId, role]])));
}

export async function anyTeamExists(db: Knex): Promise<boolean> {
  const { rows } = await db.raw<{ rows: { found: boolean }[] }>('select exists (select 1 from teams) as found');
  return rows[0]?.found ?? false;
}
