import type { Knex } from 'knex';
import { brokenConstraint } from '../../db/database-errors.ts';
import { AppError } from '../../http/app-error.ts';
import { insertPerson } from './account-store.ts';
import { hashPassword } from './password-hash.ts';
import { refuseWeakPassword } from './refuse-weak-password.ts';

/** Makes an account; the password is kept only as its hash. @returns the person's id */
export async function makePerson(db: Knex, person: { email: string; name: string; password: string }): Promise<string> {
  refuseWeakPassword(person.password, { path: 'body.password', about: [person.email, person.name] });
  const passwordHash = await hashPassword(person.password);
  try {
    return await insertPerson(db, { email: person.email, name: person.name, passwordHash });
  } catch (error) {
    if (brokenConstraint(error)?.constraint !== 'people_email_key') throw error;
    const message = 'Somebody has an account with this e-mail address already.';
    throw new AppError('invalid_input', message, [{ path: 'body.email', message }]);
  }
}
