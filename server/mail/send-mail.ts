import type { Knex } from 'knex';
import { addJob } from '../jobs/queue.ts';
import { findUnsentMail, listUnsentMailIds, setMailFailure, setMailSent } from './mail-store.ts';
import type { Mailer } from './mailer.ts';

/** A mail that waited longer than this for a server that sends is no news any more. */
const WAITS_DAYS = 7;

/** Sends one mail. Where there is no way to send, it goes on waiting. @throws what the way said, so that it is tried again */
export async function sendMail(
  { db, mailer }: { db: Knex; mailer: Mailer | null },
  { mailId }: { mailId: string },
): Promise<void> {
  if (mailer === null) return;
  const mail = await findUnsentMail(db, mailId);
  if (mail === null) return;
  try {
    await mailer.send({ id: mailId, ...mail });
  } catch (error) {
    await setMailFailure(db, { mailId, failure: error instanceof Error ? error.message : String(error) });
    throw error;
  }
  await setMailSent(db, mailId);
}

/** Mails that waited while the server sent none are sent once it does. */
export async function queueWaitingMails(db: Knex): Promise<void> {
  for (const mailId of await listUnsentMailIds(db, WAITS_DAYS)) {
    await addJob(db, { task: 'send-mail', payload: { mailId }, jobKey: `mail ${mailId}` });
  }
}
