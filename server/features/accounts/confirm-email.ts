import type { Knex } from 'knex';
import { brokenConstraint } from '../../db/database-errors.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { writeMail } from '../../mail/write-mail.ts';
import { deleteAccountKeys, useAccountKey } from './account-key-store.ts';
import { setEmail } from './account-store.ts';
import { hashOfLinkKey } from './link-key.ts';

/** Makes a new address hold, with the key that was sent to it; the old address is told. */
export async function confirmEmail(db: Knex, given: { key: string; requestId: string; at: Date }): Promise<void> {
  const { key, requestId, at } = given;
  await inTransaction(db, async (transaction) => {
    const used = await useAccountKey(transaction, { keyHash: hashOfLinkKey(key), purpose: 'email', at });
    if (used === null || used.email === null) throw notValid();
    const { personId, email } = used;
    const before = await setEmail(transaction, { personId, email }).catch((error: unknown) => {
      // Somebody has made an account with it since.
      throw brokenConstraint(error)?.constraint === 'people_email_key' ? notValid() : error;
    });
    await deleteAccountKeys(transaction, personId);
    const subject = { from: before, to: email };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'e-mail changed', subject, requestId });
    await writeMail(transaction, {
      teamId: null,
      recipient: before,
      subject: 'Your e-mail address for Muslin was changed',
      paragraphs: [
        'From now on another address signs in to your account and gets its mails.',
        'If that was not you, tell whoever runs your server of Muslin.',
      ],
      link: null,
      foot: 'Sent to the address that held until now.',
      opensAccount: true,
      at,
    });
  });
}

function notValid(): AppError {
  return new AppError('link_not_valid', 'This link was used already, is more than a day old, or was replaced.');
}
