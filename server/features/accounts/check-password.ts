import type { Knex } from 'knex';
import { findPersonByEmail } from './account-store.ts';
import { passwordMatches } from './password-hash.ts';

/**
 * The id of the person to whom e-mail and password belong, or null. An unknown e-mail costs the same comparison, so that
 * the time taken does not tell who has an account.
 */
export async function checkPassword(
  deps: { db: Knex; dummyHash: Promise<string> },
  given: { email: string; password: string },
): Promise<string | null> {
  const person = await findPersonByEmail(deps.db, given.email);
  const matches = await passwordMatches(person?.passwordHash ?? (await deps.dummyHash), given.password);
  return person !== null && matches ? person.id : null;
}
