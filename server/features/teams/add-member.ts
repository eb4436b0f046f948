import type { Knex } from 'knex';
import type { Role } from '#contract/accounts.ts';
import { insertMembership } from './team-store.ts';

/** Gives a person who is there already a role in a team. */
export async function addMember(db: Knex, member: { teamId: string; personId: string; role: Role }): Promise<void> {
  await insertMembership(db, member);
}
