import type { Knex } from 'knex';

export interface MailToStore {
  readonly teamId: string | null;
  readonly recipient: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  /** Carries a key to an account: never shown in the application, and its words are forgotten once it has gone out. */
  readonly opensAccount: boolean;
  readonly at: Date;
}

export async function insertMail(transaction: Knex.Transaction, mail: MailToStore): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into mails (team_id, recipient, subject, text, html, opens_account, made_at)
     values (:teamId, :recipient, :subject, :text, :html, :opensAccount, :at) returning id`,
    { ...mail },
  );
  return rows[0].id;
}

export interface UnsentMail {
  readonly recipient: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

/** `null` when it has gone out, or is not there any more. */
export async function findUnsentMail(db: Knex, mailId: string): Promise<UnsentMail | null> {
  const { rows } = await db.raw<{ rows: UnsentMail[] }>(
    `select mails.recipient, mails.subject, mails.text, mails.html from mails
     where mails.id = ? and mails.sent_at is null and mails.text is not null`,
    [mailId],
  );
  return rows[0] ?? null;
}

export async function setMailSent(db: Knex, mailId: string): Promise<void> {
  await db.raw(
    `update mails set sent_at = now(), failure = null,
       text = case when opens_account then null else text end, html = case when opens_account then null else html end
     where id = ?`,
    [mailId],
  );
}

export async function setMailFailure(db: Knex, mail: { mailId: string; failure: string }): Promise<void> {
  await db.raw('update mails set failure = :failure where id = :mailId and sent_at is null', mail);
}

/** Mails of the last days that no job stands for, such as those written while the server sent none. */
export async function listUnsentMailIds(db: Knex, days: number): Promise<readonly string[]> {
  const { rows } = await db.raw<{ rows: { id: string }[] }>(
    `select mails.id from mails
     where mails.sent_at is null and mails.text is not null and mails.made_at > now() - make_interval(days => ?)
     order by mails.made_at`,
    [days],
  );
  return rows.map(({ id }) => id);
}

/** Keys to accounts are not kept longer than they hold. */
export async function deleteKeyMailsBefore(db: Knex, at: Date): Promise<void> {
  await db.raw('delete from mails where opens_account and made_at < ?', [at]);
}

export interface WaitingMail {
  readonly at: Date;
  readonly recipient: string;
  readonly subject: string;
  readonly text: string;
  /** What the mail server said last; null where it was never asked. */
  readonly failure: string | null;
}

/** Every mail that has not gone out, oldest first, with the keys that some carry: for the operator alone. */
export async function listOutbox(db: Knex): Promise<readonly WaitingMail[]> {
  const { rows } = await db.raw<{ rows: WaitingMail[] }>(
    `select mails.made_at as at, mails.recipient, mails.subject, mails.text, mails.failure from mails
     where mails.sent_at is null and mails.text is not null order by mails.made_at, mails.id`,
  );
  return rows;
}
