import type { Knex } from 'knex';
import type { AuditAct } from '#contract/audit.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import type { SessionControl } from '../../http/request-context.ts';
import { checkSecondFactor } from './second-factor.ts';
import { countFailedTry, forgetFailedTries, refuseWhileResting } from './sign-in-rest.ts';

export interface SigningIn {
  readonly email: string;
  readonly code: string | undefined;
  readonly address: string;
  readonly requestId: string;
  readonly at: Date;
}

interface SignInDeps {
  readonly db: Knex;
  readonly session: SessionControl;
  readonly sessionSecrets: readonly string[];
}

/**
 * Begins a session for the person to whom e-mail and password belong, and the code where two-factor sign-in is on; writes down how
 * it went. @returns the person's id
 */
export async function signIn(deps: SignInDeps, given: SigningIn): Promise<string> {
  const { db, session } = deps;
  await refuseWhileResting(db, given);
  const personId = await session.checkPassword();
  if (personId === null) {
    await countFailedTry(db, given);
    await record(db, { ...given, personId, act: 'sign-in refused' });
    throw new AppError('wrong_sign_in', 'E-mail address and password do not belong together. Check both.');
  }
  const second = await checkSecondFactor(deps, { personId, code: given.code, at: given.at });
  if (second === 'missing')
    throw new AppError('code_needed', 'Type the code that your authenticator shows, or one of your recovery codes.');
  if (second === 'wrong') {
    await countFailedTry(db, given);
    await record(db, { ...given, personId, act: 'sign-in code refused' });
    throw new AppError('code_needed', 'This code does not hold. Type the one that your authenticator shows now.');
  }
  await session.begin(personId);
  await forgetFailedTries(db, given.email);
  const act = second === 'recovery code holds' ? 'signed in with a recovery code' : 'signed in';
  await record(db, { ...given, personId, act });
  return personId;
}

function record(db: Knex, event: SigningIn & { personId: string | null; act: AuditAct }): Promise<void> {
  const { personId, act, email, address, requestId } = event;
  return inTransaction(db, (transaction) =>
    recordAuditEvent(transaction, { teamId: null, personId, act, subject: { email, address }, requestId }),
  );
}
