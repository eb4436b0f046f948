import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { notify } from '../../mail/notify.ts';
import { deleteAccountKeys, useAccountKey } from './account-key-store.ts';
import { findPersonSecret, setPasswordHash } from './account-store.ts';
import { hashOfLinkKey } from './link-key.ts';
import { hashPassword } from './password-hash.ts';
import { refuseWeakPassword } from './refuse-weak-password.ts';
import { deleteSessions } from './session-store.ts';
import { forgetFailedTries } from './sign-in-rest.ts';

/**
 * Sets a new password with the key of a link. Every session of the account ends and every other key of it is worth nothing;
 * two-factor sign-in stays as it was, since whoever reads somebody's mail has but one of the two.
 */
export async function resetPassword(
  { db, publicUrl }: { db: Knex; publicUrl: string },
  given: { key: string; password: string; requestId: string; at: Date },
): Promise<void> {
  const { key, password, requestId, at } = given;
  await inTransaction(db, async (transaction) => {
    const used = await useAccountKey(transaction, { keyHash: hashOfLinkKey(key), purpose: 'reset', at });
    const person = used === null ? null : await findPersonSecret(transaction, used.personId);
    if (person === null)
      throw new AppError('link_not_valid', 'This link was used already, is more than an hour old, or was replaced.');
    const { id: personId, email, name } = person;
    refuseWeakPassword(password, { path: 'body.password', about: [email, name] });
    await setPasswordHash(transaction, { personId, passwordHash: await hashPassword(password) });
    await deleteAccountKeys(transaction, personId);
    await deleteSessions(transaction, { personId, but: null });
    await forgetFailedTries(transaction, email);
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'password reset', subject: {}, requestId });
    const words = 'Your password was set anew by a link from your mail, and every session ended.';
    await notify(transaction, { personId, teamId: null, kind: 'reset', words, path: '/account', publicUrl, at });
  });
}
