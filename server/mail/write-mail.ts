import type { Knex } from 'knex';
import { addJob } from '../jobs/queue.ts';
import { insertMail } from './mail-store.ts';
import { type MailWords, writtenMail } from './mail-words.ts';

export interface MailToWrite extends MailWords {
  /** The team whose leads read it where no mail is sent; null: the operator alone. */
  readonly teamId: string | null;
  readonly recipient: string;
  readonly opensAccount: boolean;
  readonly at: Date;
}

/** Writes a mail, and the job that sends it, in the caller's transaction: both are there exactly when it commits. */
export async function writeMail(transaction: Knex.Transaction, mail: MailToWrite): Promise<void> {
  const { teamId, recipient, opensAccount, at } = mail;
  const written = { teamId, recipient, opensAccount, at, ...writtenMail(mail) };
  const mailId = await insertMail(transaction, written);
  await addJob(transaction, { task: 'send-mail', payload: { mailId }, jobKey: `mail ${mailId}` });
}
