import { createHash } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { lastKeyTo, mailsTo } from '../../support/mail-box.ts';
import { MINUTE_MS, makeMovingClock } from '../../support/moving-clock.ts';
import { type Agent, openWeb, PASSWORD, type WebForTests } from '../../support/open-web.ts';

const clock = makeMovingClock();
let web: WebForTests;
let people = 0;

beforeAll(async () => {
  web = await openWeb({ now: clock.now });
});
// Every test has a minute of its own, so that no test spends the limits of another.
beforeEach(() => clock.moveMs(MINUTE_MS));
afterAll(() => web.close());

async function person(): Promise<{ email: string; id: string; agent: Agent }> {
  people += 1;
  const email = `person-${people}@example.org`;
  const id = await web.makePerson(email);
  return { email, id, agent: await web.signIn(email) };
}
const entry = (email: string, more: Record<string, unknown> = {}) =>
  web
    .browser()
    .post('/api/session')
    .send({ email, password: PASSWORD, ...more });
const actsOf = async (personId: string) => {
  const { rows } = await web.database.ownerDb.raw<{ rows: { act: string }[] }>(
    'select act from audit_events where person_id = ? order by id',
    [personId],
  );
  return rows.map(({ act }) => act);
};

describe('a new password', () => {
  test('comes by a link that works once, ends every session and opens the account', async () => {
    const { email, id, agent } = await person();
    await web.browser().post('/api/password-reset/request').send({ email }).expect(204);
    const key = await lastKeyTo(web.database, email);
    const { rows } = await web.database.ownerDb.raw('select key_hash from account_keys');
    expect(JSON.stringify(rows)).not.toContain(key);
    const password = 'four words of a new kind';
    await web.browser().post('/api/password-reset').send({ key, password }).expect(204);
    expect((await agent.get('/api/session')).body.person).toBeNull();
    await entry(email).expect(401);
    await entry(email, { password }).expect(200);
    // Replayed.
    const again = await web.browser().post('/api/password-reset').send({ key, password: PASSWORD }).expect(410);
    expect(again.body.code).toBe('link_not_valid');
    expect((await mailsTo(web.database, email)).at(-1)).toMatchObject({
      subject: expect.stringMatching(/^Your password was set anew/),
    });
    expect(await actsOf(id)).toEqual(expect.arrayContaining(['password reset asked', 'password reset']));
  });

  test('is set once by a link that several use at the same moment', async () => {
    const { email } = await person();
    await web.browser().post('/api/password-reset/request').send({ email }).expect(204);
    const key = await lastKeyTo(web.database, email);
    const answers = await Promise.all(
      ['one', 'two', 'three'].map((which) =>
        web
          .browser()
          .post('/api/password-reset')
          .send({ key, password: `four words of kind ${which}` }),
      ),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([204, 410, 410]);
  });

  test('comes by a link to where the server is, whatever the request says of that', async () => {
    const { email } = await person();
    const lying = { Host: 'evil.example', 'X-Forwarded-Host': 'evil.example', Origin: 'http://evil.example' };
    await web.browser().post('/api/password-reset/request').set(lying).send({ email }).expect(204);
    const [mail] = await mailsTo(web.database, email);
    expect(mail?.text).toContain('https://muslin.example/');
    expect(JSON.stringify(mail)).not.toContain('evil.example');
  });

  test('is offered in the same words to an address without an account, which gets no mail', async () => {
    const unknown = await web.browser().post('/api/password-reset/request').send({ email: 'nobody@example.org' });
    const known = await web
      .browser()
      .post('/api/password-reset/request')
      .send({ email: (await person()).email });
    expect([unknown.status, unknown.text]).toEqual([known.status, known.text]);
    expect(await mailsTo(web.database, 'nobody@example.org')).toEqual([]);
  });

  test('is not mailed twice within two minutes, and a newer link replaces the older one', async () => {
    const { email } = await person();
    const ask = () => web.browser().post('/api/password-reset/request').send({ email }).expect(204);
    await ask();
    const first = await lastKeyTo(web.database, email);
    await ask();
    expect(await mailsTo(web.database, email)).toHaveLength(1);
    clock.moveMs(3 * MINUTE_MS);
    await ask();
    const password = 'four words of a new kind';
    await web.browser().post('/api/password-reset').send({ key: first, password }).expect(410);
    const second = await lastKeyTo(web.database, email);
    // Tampered with, of another purpose, and expired.
    await web
      .browser()
      .post('/api/password-reset')
      .send({ key: `${second}x`, password })
      .expect(410);
    await web.browser().post('/api/email-confirmation').send({ key: second }).expect(410);
    clock.moveMs(61 * MINUTE_MS);
    await web.browser().post('/api/password-reset').send({ key: second, password }).expect(410);
  });

  test('that many people use, that repeats a piece or is the address is refused, and the link still works', async () => {
    const { email } = await person();
    await web.browser().post('/api/password-reset/request').send({ email }).expect(204);
    const key = await lastKeyTo(web.database, email);
    for (const password of ['password2024!', 'qwertyuiopasdfghjkl', 'abcabcabcabcab', email]) {
      const { body } = await web.browser().post('/api/password-reset').send({ key, password }).expect(400);
      expect(body.problems).toMatchObject([{ path: 'body.password' }]);
    }
    await web.browser().post('/api/password-reset').send({ key, password: 'a rather plain sentence' }).expect(204);
  });

  test('needs the old one of whoever is signed in, ends the other sessions and kills links that wait', async () => {
    const { email, agent } = await person();
    const other = await web.signIn(email);
    await web.browser().post('/api/password-reset/request').send({ email }).expect(204);
    const newPassword = 'four words of a new kind';
    const wrong = await agent.put('/api/account/password').send({ password: 'not this one', newPassword }).expect(400);
    expect(wrong.body.problems).toEqual([{ path: 'body.password', message: 'This is not your password.' }]);
    await agent.put('/api/account/password').send({ password: PASSWORD, newPassword }).expect(204);
    expect((await other.get('/api/session')).body.person).toBeNull();
    expect((await agent.get('/api/session')).body.person.email).toBe(email);
    const key = await lastKeyTo(web.database, email);
    await web.browser().post('/api/password-reset').send({ key, password: PASSWORD }).expect(410);
  });
});

describe('failing again and again', () => {
  test('lets an account rest for an hour, known or not, until a new password by mail', async () => {
    const { email } = await person();
    const fail = async (address: string) => {
      await entry(address, { password: 'not this one' }).expect(401);
      const hash = createHash('sha256').update(address).digest('hex');
      // Stands for the many failures between.
      await web.database.ownerDb.raw('update sign_in_failures set failures = 49 where account_hash = ?', [hash]);
      await entry(address, { password: 'not this one' }).expect(401);
      clock.moveMs(MINUTE_MS);
    };
    await fail(email);
    await fail('unknown@example.org');
    for (const address of [email, 'unknown@example.org']) {
      const resting = await entry(address).expect(429);
      expect(Number(resting.headers['retry-after'])).toBeGreaterThan(3000);
    }
    await web.browser().post('/api/password-reset/request').send({ email }).expect(204);
    const key = await lastKeyTo(web.database, email);
    const password = 'four words of a new kind';
    await web.browser().post('/api/password-reset').send({ key, password }).expect(204);
    await entry(email, { password }).expect(200);
  });
});

test('nothing was logged as a fault of ours', () => {
  expect(web.log.errors).toEqual([]);
});
