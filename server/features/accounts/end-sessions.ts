import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { deleteSession, deleteSessions } from './session-store.ts';

/** Ends one session of a person's own. */
export async function endSession(
  db: Knex,
  { personId, sessionId, requestId }: { personId: string; sessionId: string; requestId: string },
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    if (!(await deleteSession(transaction, { personId, sessionId })))
      throw new AppError('not_found', 'There is no such session of yours; it may have ended.');
    const subject = { sessionId };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'session ended', subject, requestId });
  });
}

/** Ends every session of a person's own but the one that asks. */
export async function endOtherSessions(
  db: Knex,
  { personId, sid, requestId }: { personId: string; sid: string; requestId: string },
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    const ended = await deleteSessions(transaction, { personId, but: sid });
    const subject = { sessionsEnded: ended };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'other sessions ended', subject, requestId });
  });
}
