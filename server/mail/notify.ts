import type { Knex } from 'knex';
import type { NoticeKind } from '#contract/notices.ts';
import { insertWantedNotice } from './notice-store.ts';
import { writeMail } from './write-mail.ts';

export interface Telling {
  readonly personId: string;
  readonly teamId: string | null;
  readonly kind: NoticeKind;
  /** One sentence, without figures of a result: mails travel farther than their readers think. */
  readonly words: string;
  /** The page that it is about. */
  readonly path: string;
  readonly publicUrl: string;
  readonly at: Date;
}

/** Tells a person of something, in the application and by mail at once, unless the person has that kind off. */
export async function notify(transaction: Knex.Transaction, telling: Telling): Promise<void> {
  const { personId, teamId, kind, words, path, publicUrl, at } = telling;
  const recipient = await insertWantedNotice(transaction, { personId, teamId, kind, words, path, at });
  if (recipient === null) return;
  await writeMail(transaction, {
    teamId,
    recipient,
    subject: words.replace(/\.$/, ''),
    paragraphs: [words],
    link: { words: 'Open it in Muslin', url: `${publicUrl}${path}` },
    foot: `You get this as a notice of the kind “${kind}”. Turn the kind off on your account page: ${publicUrl}/account`,
    opensAccount: false,
    at,
  });
}
