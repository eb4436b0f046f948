import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { AppError } from '../../http/app-error.ts';
import { writeMail } from '../../mail/write-mail.ts';
import { replaceAccountKey } from './account-key-store.ts';
import { findPersonByEmail } from './account-store.ts';
import { newLinkKey } from './link-key.ts';
import { requirePassword } from './require-password.ts';

const HOLDS_MS = 24 * 60 * 60_000;

/**
 * Sends a link to the new address; the address holds once the link has been followed. An address that has an account is sent words
 * instead of a link, and the asker is told the same as otherwise.
 */
export async function askEmailChange(
  { db, publicUrl }: { db: Knex; publicUrl: string },
  asked: { personId: string; password: string; email: string; requestId: string; at: Date },
): Promise<void> {
  const { personId, email, requestId, at } = asked;
  const person = await requirePassword(db, asked);
  if (person.email === email) {
    const message = 'This is your address already.';
    throw new AppError('invalid_input', message, [{ path: 'body.email', message }]);
  }
  await inTransaction(db, async (transaction) => {
    const isTaken = (await findPersonByEmail(transaction, email)) !== null;
    const subject = { from: person.email, to: email };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'e-mail change asked', subject, requestId });
    const { key, keyHash } = newLinkKey();
    const expiresAt = new Date(at.getTime() + HOLDS_MS);
    if (!isTaken) await replaceAccountKey(transaction, { keyHash, personId, purpose: 'email', email, at, expiresAt });
    await writeMail(transaction, {
      teamId: null,
      recipient: email,
      subject: 'Your new e-mail address for Muslin',
      paragraphs: isTaken
        ? ['Somebody wanted to use this address for another account. You have an account with it: nothing was changed.']
        : [
            `${person.name} wants to sign in to Muslin with this address. The link makes it hold; it works once, within a day.`,
          ],
      link: isTaken ? null : { words: 'Use this address', url: `${publicUrl}/new-address/${key}` },
      foot: 'Sent because this address was typed on the account page of Muslin. If that was not you, do nothing.',
      opensAccount: true,
      at,
    });
  });
}
