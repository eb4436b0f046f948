import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import { AppError } from '../../http/app-error.ts';
import { countFailure, findRest, forgetFailures } from './failure-store.ts';

/**
 * Failures in a row after which signing in rests for an hour; each one more makes it rest again. Half of the hundred that NIST SP
 * 800-63B allows (from memory). Counted for addresses without an account as well, so that resting tells nothing.
 */
const REST_AFTER = 50;
const REST_MINUTES = 60;

interface Account {
  readonly email: string;
  readonly at: Date;
}

/** @throws AppError too_many_requests while it rests, whatever the password */
export async function refuseWhileResting(db: Knex, { email, at }: Account): Promise<void> {
  const until = await findRest(db, { accountHash: hashOf(email), at });
  if (until === null) return;
  const retryAfterS = Math.max(1, Math.ceil((until.getTime() - at.getTime()) / 1000));
  const message =
    'Too many tries failed. Signing in to this account rests for an hour; a new password by mail ends that.';
  throw new AppError('too_many_requests', message, [], { retryAfterS });
}

export async function countFailedTry(db: Knex, { email, at }: Account): Promise<void> {
  await countFailure(db, { accountHash: hashOf(email), at, restAfter: REST_AFTER, restMinutes: REST_MINUTES });
}

export async function forgetFailedTries(db: Knex, email: string): Promise<void> {
  await forgetFailures(db, hashOf(email));
}

function hashOf(email: string): string {
  return createHash('sha256').update(email).digest('hex');
}
