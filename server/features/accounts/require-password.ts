import type { Knex } from 'knex';
import { AppError } from '../../http/app-error.ts';
import { findPersonSecret } from './account-store.ts';
import { passwordMatches } from './password-hash.ts';
import { countFailedTry, refuseWhileResting } from './sign-in-rest.ts';

/**
 * The password typed once more before an account is changed: a session alone, left open or stolen, does not give the account away.
 * Failures count as those of signing in.
 * @throws AppError invalid_input at body.password
 */
export async function requirePassword(
  db: Knex,
  { personId, password, at }: { personId: string; password: string; at: Date },
): Promise<{ email: string; name: string }> {
  const person = await findPersonSecret(db, personId);
  if (person === null) throw new AppError('not_signed_in', 'Sign in first.');
  await refuseWhileResting(db, { email: person.email, at });
  if (await passwordMatches(person.passwordHash, password)) return person;
  await countFailedTry(db, { email: person.email, at });
  const message = 'This is not your password.';
  throw new AppError('invalid_input', message, [{ path: 'body.password', message }]);
}
