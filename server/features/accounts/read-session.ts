import type { Knex } from 'knex';
import type { Session } from '#contract/accounts.ts';
import { listMemberships } from '../teams/team-read-model.ts';
import { findPerson } from './account-read-model.ts';

/** What the browser knows of who is signed in; nobody when the person is gone. */
export async function readSession(db: Knex, { personId, at }: { personId: string | null; at: Date }): Promise<Session> {
  const person = personId === null ? null : await findPerson(db, personId);
  return person === null
    ? { person: null, memberships: [] }
    : { person, memberships: await listMemberships(db, { personId: person.id, at }) };
}
