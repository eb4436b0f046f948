import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { inTransaction } from '../../../server/db/in-transaction.ts';
import { makePerson } from '../../../server/features/accounts/make-person.ts';
import { writtenMail } from '../../../server/mail/mail-words.ts';
import { type Mailer, smtpMailer } from '../../../server/mail/mailer.ts';
import { notify } from '../../../server/mail/notify.ts';
import { queueWaitingMails, sendMail } from '../../../server/mail/send-mail.ts';
import { writeMail } from '../../../server/mail/write-mail.ts';
import { mailsTo } from '../../support/mail-box.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

interface Taken {
  readonly to: readonly string[];
  readonly content: string;
}

let database: TestDatabase;
let smtp: SMTPServer;
let mailer: Mailer;
let refusing = false;
const taken: Taken[] = [];

beforeAll(async () => {
  database = await makeTestDatabase();
  smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData(stream, session, done) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        if (refusing) return done(new Error('the letter-box is full'));
        const to = session.envelope.rcptTo.map(({ address }) => address);
        taken.push({ to, content: Buffer.concat(chunks).toString('utf8') });
        done();
      });
    },
  });
  await new Promise<void>((resolve) => smtp.listen(0, '127.0.0.1', resolve));
  const { port }: AddressInfo = addressOf(smtp.server.address());
  mailer = smtpMailer({ url: `smtp://127.0.0.1:${port}`, from: 'muslin@example.org' });
});
beforeEach(() => {
  taken.length = 0;
  refusing = false;
});
afterAll(async () => {
  mailer.close();
  await new Promise<void>((resolve) => smtp.close(resolve));
  await database.drop();
});

function addressOf(address: AddressInfo | string | null): AddressInfo {
  if (address === null || typeof address === 'string') throw new Error('the mail server does not listen');
  return address;
}

const at = new Date('2026-03-01T10:00:00Z');
const words = {
  subject: 'A word',
  paragraphs: ['One sentence.'],
  link: { words: 'Open it', url: 'https://muslin.example/account' },
  foot: 'Why it came.',
};
async function write(more: Partial<Parameters<typeof writeMail>[1]> = {}): Promise<string> {
  const mail = { ...words, teamId: null, recipient: 'ada@example.org', opensAccount: false, at, ...more };
  await inTransaction(database.db, (transaction) => writeMail(transaction, mail));
  const { rows } = await database.ownerDb.raw<{ rows: { id: string }[] }>(
    'select id from mails where sent_at is null order by ctid desc limit 1',
  );
  return rows[0]?.id ?? '';
}

describe('a mail', () => {
  test('is there with its job exactly when the transaction commits', async () => {
    const failing = inTransaction(database.db, async (transaction) => {
      const mail = { ...words, teamId: null, recipient: 'lost@example.org', opensAccount: false, at };
      await writeMail(transaction, mail);
      throw new Error('something else went wrong');
    });
    await expect(failing).rejects.toThrow('something else');
    expect(await mailsTo(database, 'lost@example.org')).toEqual([]);
    const mailId = await write();
    const { rows } = await database.db.raw('select jobs.key from graphile_worker.jobs where jobs.key = ?', [
      `mail ${mailId}`,
    ]);
    expect(rows).toHaveLength(1);
  });

  test('goes out once as plain text and HTML, and a key is forgotten with that', async () => {
    const mailId = await write({ opensAccount: true });
    await sendMail({ db: database.db, mailer }, { mailId });
    await sendMail({ db: database.db, mailer }, { mailId });
    expect(taken).toHaveLength(1);
    expect(taken[0]?.to).toEqual(['ada@example.org']);
    expect(taken[0]?.content).toContain(`Message-ID: <${mailId}@example.org>`);
    expect(taken[0]?.content).toContain('Content-Type: text/plain');
    expect(taken[0]?.content).toContain('Content-Type: text/html');
    const { rows } = await database.ownerDb.raw('select text, html from mails where id = ?', [mailId]);
    expect(rows).toEqual([{ text: null, html: null }]);
  });

  test('that the mail server refuses stays, says why, and is tried again', async () => {
    const mailId = await write();
    refusing = true;
    await expect(sendMail({ db: database.db, mailer }, { mailId })).rejects.toThrow('letter-box is full');
    const { rows } = await database.ownerDb.raw('select failure, sent_at from mails where id = ?', [mailId]);
    expect(rows).toMatchObject([{ failure: expect.stringContaining('letter-box is full'), sent_at: null }]);
    refusing = false;
    await sendMail({ db: database.db, mailer }, { mailId });
    expect(taken).toHaveLength(1);
  });

  test('waits where none is sent, and is queued once there is a way', async () => {
    const mailId = await write();
    await database.ownerDb.raw('update mails set made_at = now() where id = ?', [mailId]);
    await sendMail({ db: database.db, mailer: null }, { mailId });
    await database.db.raw('select graphile_worker.complete_jobs(array(select jobs.id from graphile_worker.jobs))');
    await queueWaitingMails(database.db);
    const { rows } = await database.db.raw<{ rows: { key: string }[] }>('select jobs.key from graphile_worker.jobs');
    expect(rows.map(({ key }) => key)).toContain(`mail ${mailId}`);
  });

  test('carries no head line that somebody has typed into a name', async () => {
    const name = 'Northern\r\nBcc: everyone@example.org\r\n\r\nBuy this';
    const mailId = await write({ subject: `Invitation into the team ${name}`, paragraphs: [`Come to ${name}.`] });
    await sendMail({ db: database.db, mailer }, { mailId });
    const [head = ''] = (taken[0]?.content ?? '').split(/\r?\n\r?\n/);
    expect(head).not.toMatch(/^Bcc:/im);
    expect(taken[0]?.to).toEqual(['ada@example.org']);
    await expect(write({ recipient: 'a@example.org\r\nBcc: b@example.org' })).rejects.toThrow('mails_recipient_check');
  });

  test('shows what was typed as words, never as HTML', () => {
    const { html, text } = writtenMail({ ...words, paragraphs: ['<script>alert("x")</script> & so on'] });
    expect(html).not.toContain('<script>');
    expect(html).toContain('&lt;script&gt;alert(&quot;x&quot;)&lt;/script&gt; &amp; so on');
    expect(text).toContain('<script>');
    expect(html).not.toMatch(/src=|<img|<link|<style/);
  });
});

describe('a notice', () => {
  test('is told in the application and by mail, unless the person has its kind off', async () => {
    const personId = await makePerson(database.db, {
      email: 'reader@example.org',
      name: 'A reader',
      password: 'a long pass phrase for tests',
    });
    const tell = () =>
      inTransaction(database.db, (transaction) =>
        notify(transaction, {
          ...{ personId, teamId: null, kind: 'comment', words: 'Ann commented on your sheet.', path: '/account' },
          publicUrl: 'https://muslin.example',
          at,
        }),
      );
    await tell();
    const [mail] = await mailsTo(database, 'reader@example.org');
    expect(mail).toMatchObject({ subject: 'Ann commented on your sheet', opensAccount: false });
    expect(mail?.text).toContain('https://muslin.example/account');
    await database.ownerDb.raw(`update people set notices_off = '{comment}' where id = ?`, [personId]);
    await tell();
    const { rows } = await database.ownerDb.raw('select kind, words, path from notices where person_id = ?', [
      personId,
    ]);
    expect(rows).toEqual([{ kind: 'comment', words: 'Ann commented on your sheet.', path: '/account' }]);
    expect(await mailsTo(database, 'reader@example.org')).toHaveLength(1);
  });
});
