import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import type { SessionControl } from '../../http/request-context.ts';

/** Ends the session on the server, so that its id is worth nothing afterwards. */
export async function signOut(
  deps: { db: Knex; session: SessionControl },
  { personId, requestId }: { personId: string; requestId: string },
): Promise<void> {
  await inTransaction(deps.db, (transaction) =>
    recordAuditEvent(transaction, { teamId: null, personId, act: 'signed out', subject: {}, requestId }),
  );
  await deps.session.end();
}
