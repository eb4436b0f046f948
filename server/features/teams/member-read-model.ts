import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';

export interface MemberView {
  readonly personId: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
  readonly since: Date;
  readonly endsAt: Date | null;
}

const MEMBER = `
  select people.id as "personId", people.name, people.email, memberships.role, memberships.since,
    memberships.ends_at as "endsAt"
  from memberships join people on people.id = memberships.person_id`;

export async function listMemberViews(db: Knex, teamId: string): Promise<readonly MemberView[]> {
  const { rows } = await db.raw<{ rows: MemberView[] }>(
    `${MEMBER} where memberships.team_id = ? order by people.name, people.id`,
    [teamId],
  );
  return rows;
}

/** `null` when the person is not in the team. */
export async function findMemberView(db: Knex, key: { teamId: string; personId: string }): Promise<MemberView | null> {
  const { rows } = await db.raw<{ rows: MemberView[] }>(
    `${MEMBER} where memberships.team_id = :teamId and memberships.person_id = :personId`,
    key,
  );
  return rows[0] ?? null;
}
