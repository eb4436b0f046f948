import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { deleteAccountKeys } from './account-key-store.ts';
import { setPasswordHash } from './account-store.ts';
import { hashPassword } from './password-hash.ts';
import { refuseWeakPassword } from './refuse-weak-password.ts';
import { requirePassword } from './require-password.ts';
import { deleteSessions } from './session-store.ts';

/** Changes the password for whoever knows the old one. Every other session ends, and links that wait in mails are worth nothing. */
export async function changePassword(
  db: Knex,
  change: { personId: string; sid: string; password: string; newPassword: string; requestId: string; at: Date },
): Promise<void> {
  const { personId, sid, newPassword, requestId } = change;
  const { email, name } = await requirePassword(db, change);
  refuseWeakPassword(newPassword, { path: 'body.newPassword', about: [email, name] });
  const passwordHash = await hashPassword(newPassword);
  await inTransaction(db, async (transaction) => {
    await setPasswordHash(transaction, { personId, passwordHash });
    await deleteAccountKeys(transaction, personId);
    const ended = await deleteSessions(transaction, { personId, but: sid });
    const subject = { sessionsEnded: ended };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'password changed', subject, requestId });
  });
}
