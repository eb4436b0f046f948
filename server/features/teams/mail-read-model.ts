import type { Knex } from 'knex';

export interface MailView {
  readonly id: string;
  readonly recipient: string;
  readonly subject: string;
  readonly text: string;
  readonly madeAt: Date;
}

/** Mails of a team that have not gone out, newest first; none that opens an account. */
export async function listWaitingMails(db: Knex, teamId: string): Promise<readonly MailView[]> {
  const { rows } = await db.raw<{ rows: MailView[] }>(
    `select mails.id, mails.recipient, mails.subject, mails.text, mails.made_at as "madeAt"
     from mails
     where mails.team_id = ? and mails.sent_at is null and not mails.opens_account and mails.text is not null
     order by mails.made_at desc, mails.id limit 200`,
    [teamId],
  );
  return rows;
}
