import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { type MemberAct, noSuchMember } from './change-member.ts';
import { deleteSessionsOf, findMember } from './member-store.ts';

/** Signs a member out everywhere, as when a computer was lost; the person signs in again with the password. */
export async function endMemberSessions(db: Knex, { teamId, personId, by, requestId }: MemberAct): Promise<void> {
  await inTransaction(db, async (transaction) => {
    if ((await findMember(transaction, { teamId, personId })) === null) throw noSuchMember();
    const ended = await deleteSessionsOf(transaction, personId);
    const subject = { personId, sessionsEnded: ended };
    await recordAuditEvent(transaction, {
      teamId,
      personId: by,
      act: 'sessions of a member ended',
      subject,
      requestId,
    });
  });
}
