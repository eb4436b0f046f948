/** What was written to somebody, as the database keeps it until it has gone out. */
import type { TestDatabase } from './test-database.ts';

export interface KeptMail {
  readonly recipient: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly teamId: string | null;
  readonly opensAccount: boolean;
}

/** Newest last. */
export async function mailsTo(
  { ownerDb }: Pick<TestDatabase, 'ownerDb'>,
  recipient: string,
): Promise<readonly KeptMail[]> {
  const { rows } = await ownerDb.raw<{ rows: KeptMail[] }>(
    `select recipient, subject, text, html, team_id as "teamId", opens_account as "opensAccount"
     from mails where recipient = ? order by made_at, ctid`,
    [recipient],
  );
  return rows;
}

/** The key at the end of the link in the last mail. */
export async function lastKeyTo(database: Pick<TestDatabase, 'ownerDb'>, recipient: string): Promise<string> {
  const mail = (await mailsTo(database, recipient)).at(-1);
  const key = /https:\/\/muslin\.example\/[\w-]+\/([\w-]{43})\s/.exec(mail?.text ?? '')?.[1];
  if (key === undefined) throw new Error(`no mail to ${recipient} carries a key`);
  return key;
}
