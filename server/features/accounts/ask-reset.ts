import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { writeMail } from '../../mail/write-mail.ts';
import { keyMadeSince, replaceAccountKey } from './account-key-store.ts';
import { findPersonByEmail } from './account-store.ts';
import { newLinkKey } from './link-key.ts';

const HOLDS_MS = 60 * 60_000;
/** Asking again and again fills nobody's letter-box. */
const AGAIN_AFTER_MS = 2 * 60_000;

/** Sends a link to the address if it is that of an account; tells the asker nothing either way. */
export async function askReset(
  { db, publicUrl }: { db: Knex; publicUrl: string },
  { email, requestId, at }: { email: string; requestId: string; at: Date },
): Promise<void> {
  await inTransaction(db, async (transaction) => {
    const person = await findPersonByEmail(transaction, email);
    const personId = person?.id ?? null;
    const subject = { email };
    await recordAuditEvent(transaction, { teamId: null, personId, act: 'password reset asked', subject, requestId });
    if (person === null) return;
    const since = new Date(at.getTime() - AGAIN_AFTER_MS);
    if (await keyMadeSince(transaction, { personId: person.id, purpose: 'reset', since })) return;
    const { key, keyHash } = newLinkKey();
    const expiresAt = new Date(at.getTime() + HOLDS_MS);
    const made = { keyHash, personId: person.id, purpose: 'reset', email: null, at, expiresAt } as const;
    await replaceAccountKey(transaction, made);
    await writeMail(transaction, {
      teamId: null,
      recipient: email,
      subject: 'Set a new password for Muslin',
      paragraphs: [
        'Somebody, most likely you, has asked for a new password for your account.',
        'The link works once, within an hour. If it was not you, do nothing: your password stays as it is.',
      ],
      link: { words: 'Set a new password', url: `${publicUrl}/new-password/${key}` },
      foot: 'Sent because a new password was asked for. Nobody but you can use the link unless you pass it on.',
      opensAccount: true,
      at,
    });
  });
}
