/** Two-factor sign-in from beginning to end: a secret is made, confirmed by a code, and given up again. */
import type { Knex } from 'knex';
import type { AuditAct } from '#contract/audit.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { requirePassword } from './require-password.ts';
import { openSecret, sealSecret } from './seal-secret.ts';
import {
  hashOfRecoveryCode,
  newRecoveryCodes,
  newTwoFactorSecret,
  stepOfCode,
  twoFactorUri,
} from './two-factor-code.ts';
import {
  beginTwoFactor,
  findTwoFactor,
  removeTwoFactor,
  replaceRecoveryCodes,
  setTwoFactorSecret,
} from './two-factor-store.ts';

interface TwoFactorDeps {
  readonly db: Knex;
  readonly sessionSecrets: readonly [string, ...string[]];
}

interface Reentry {
  readonly personId: string;
  readonly password: string;
  readonly requestId: string;
  readonly at: Date;
}

/** Makes the secret; nothing changes about signing in until a code of it has been confirmed. */
export async function startTwoFactor(
  { db, sessionSecrets }: TwoFactorDeps,
  given: Reentry,
): Promise<{ secret: string; uri: string }> {
  const { email } = await requirePassword(db, given);
  const secret = newTwoFactorSecret();
  const sealed = sealSecret(secret, sessionSecrets);
  if (!(await setTwoFactorSecret(db, { personId: given.personId, secret: sealed }))) throw isOn();
  return { secret, uri: twoFactorUri({ secret, email }) };
}

/** @returns the recovery codes, which are kept as hashes alone */
export async function confirmTwoFactor(
  { db, sessionSecrets }: TwoFactorDeps,
  { personId, code, requestId, at }: { personId: string; code: string; requestId: string; at: Date },
): Promise<readonly string[]> {
  const known = await findTwoFactor(db, personId);
  if (known === null || known.secret === null)
    throw new AppError('wrong_state', 'There is no secret to confirm. Begin with setting up the authenticator.');
  if (known.since !== null) throw isOn();
  const secret = openSecret(known.secret, sessionSecrets);
  const step = secret === null ? null : stepOfCode(code, { secret, at });
  if (step === null) {
    const message =
      'This code does not hold. Type the one that your authenticator shows now, and check the clock of its device.';
    throw new AppError('invalid_input', message, [{ path: 'body.code', message }]);
  }
  return inTransaction(db, async (transaction) => {
    if (!(await beginTwoFactor(transaction, { personId, step, at }))) throw isOn();
    return giveCodes(transaction, { personId, act: 'two-factor sign-in begun', requestId });
  });
}

export async function endTwoFactor(db: Knex, given: Reentry): Promise<void> {
  await requirePassword(db, given);
  const { personId, requestId } = given;
  await inTransaction(db, async (transaction) => {
    await removeTwoFactor(transaction, personId);
    const act = 'two-factor sign-in ended';
    await recordAuditEvent(transaction, { teamId: null, personId, act, subject: {}, requestId });
  });
}

/** @returns the new codes; the old ones are worth nothing */
export async function renewRecoveryCodes(db: Knex, given: Reentry): Promise<readonly string[]> {
  await requirePassword(db, given);
  const { personId, requestId } = given;
  const known = await findTwoFactor(db, personId);
  if (known === null || known.since === null)
    throw new AppError('wrong_state', 'Two-factor sign-in is off, so there is nothing to recover.');
  return inTransaction(db, (transaction) =>
    giveCodes(transaction, { personId, act: 'recovery codes renewed', requestId }),
  );
}

async function giveCodes(
  transaction: Knex.Transaction,
  { personId, act, requestId }: { personId: string; act: AuditAct; requestId: string },
): Promise<readonly string[]> {
  const codes = newRecoveryCodes();
  await replaceRecoveryCodes(transaction, { personId, hashes: codes.map(hashOfRecoveryCode) });
  await recordAuditEvent(transaction, { teamId: null, personId, act, subject: {}, requestId });
  return codes;
}

function isOn(): AppError {
  return new AppError('wrong_state', 'Two-factor sign-in is on already. End it first to set up another authenticator.');
}
