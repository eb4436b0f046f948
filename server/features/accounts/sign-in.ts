import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import type { SessionControl } from '../../http/request-context.ts';

export interface SigningIn {
  readonly email: string;
  readonly address: string;
  readonly requestId: string;
}

/** Begins a session for the person to whom e-mail and password belong, and writes down how it went. @returns the person's id */
export async function signIn(
  deps: { db: Knex; session: SessionControl },
  { email, address, requestId }: SigningIn,
): Promise<string> {
  const personId = await deps.session.signIn();
  const act = personId === null ? 'sign-in refused' : 'signed in';
  await inTransaction(deps.db, (transaction) =>
    recordAuditEvent(transaction, { teamId: null, personId, act, subject: { email, address }, requestId }),
  );
  if (personId === null)
    throw new AppError('wrong_sign_in', 'E-mail address and password do not belong together. Check both.');
  return personId;
}
