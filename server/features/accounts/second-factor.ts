import type { Knex } from 'knex';
import { openSecret } from './seal-secret.ts';
import { hashOfRecoveryCode, stepOfCode } from './two-factor-code.ts';
import { findTwoFactor, spendRecoveryCode, spendTwoFactorStep } from './two-factor-store.ts';

export type SecondFactor = 'not wanted' | 'missing' | 'wrong' | 'holds' | 'recovery code holds';

/** Whether the code that came with the right password holds; one that does is used up. */
export async function checkSecondFactor(
  { db, sessionSecrets }: { db: Knex; sessionSecrets: readonly string[] },
  { personId, code, at }: { personId: string; code: string | undefined; at: Date },
): Promise<SecondFactor> {
  const known = await findTwoFactor(db, personId);
  if (known === null || known.since === null || known.secret === null) return 'not wanted';
  if (code === undefined || code === '') return 'missing';
  const secret = openSecret(known.secret, sessionSecrets);
  const step = secret === null ? null : stepOfCode(code, { secret, at });
  if (step !== null && (await spendTwoFactorStep(db, { personId, step }))) return 'holds';
  const hash = hashOfRecoveryCode(code);
  return (await spendRecoveryCode(db, { personId, hash, at })) ? 'recovery code holds' : 'wrong';
}
