import supertest from 'supertest';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { hashPassword } from '../../../server/features/accounts/password-hash.ts';
import { openWeb, PASSWORD, type WebForTests } from '../../support/open-web.ts';

const START = new Date('2026-03-01T10:00:00Z').getTime();
let offsetMs = 0;
const now = () => new Date(START + offsetMs);

let web: WebForTests;

beforeAll(async () => {
  web = await openWeb({ now });
  await web.makePerson('lead@example.org');
});
// Every test has a minute of its own, so that no test spends the limits of another.
beforeEach(() => {
  offsetMs += 60_000;
});
afterAll(() => web.close());

const sessionRows = async () => {
  const { rows } = await web.database.ownerDb.raw<{ rows: { sid: string; sess: unknown }[] }>('select * from sessions');
  return rows;
};
const auditActs = async () => {
  const { rows } = await web.database.ownerDb.raw<{
    rows: { act: string; subject: unknown; person_id: string | null }[];
  }>('select act, subject, person_id from audit_events order by id');
  return rows;
};
const cookieOf = (response: supertest.Response): string => {
  const [cookie] = [response.headers['set-cookie']].flat();
  return (cookie ?? '').split(';')[0] ?? '';
};

describe('signing in', () => {
  test('answers who one is, remembers it in a row and a cookie that scripts cannot read', async () => {
    const browser = web.browser();
    expect((await browser.get('/api/session').expect(200)).body).toEqual({ person: null, memberships: [] });
    const response = await browser
      .post('/api/session')
      .send({ email: '  Lead@Example.org ', password: PASSWORD })
      .expect(200);
    expect(response.body).toMatchObject({ person: { email: 'lead@example.org' }, memberships: [] });
    expect(response.headers['set-cookie']?.[0]).toMatch(
      /^muslin_session=.*; Path=\/; Expires=.*; HttpOnly; SameSite=Lax$/,
    );
    expect((await browser.get('/api/session')).body.person.email).toBe('lead@example.org');
    expect(await sessionRows()).toHaveLength(1);
    expect((await auditActs()).at(-1)).toMatchObject({ act: 'signed in', subject: { email: 'lead@example.org' } });
  });

  test('marks the cookie Secure when a trusted proxy says that the browser came over https', async () => {
    const response = await web
      .browser()
      .post('/api/session')
      .set('X-Forwarded-Proto', 'https')
      .send({ email: 'lead@example.org', password: PASSWORD });
    expect(response.headers['set-cookie']?.[0]).toContain('; Secure;');
  });

  test('says the same of a wrong password and of an unknown e-mail address, and writes both down', async () => {
    const wrong = await web
      .browser()
      .post('/api/session')
      .send({ email: 'lead@example.org', password: 'not this one' });
    const unknown = await web.browser().post('/api/session').send({ email: 'nobody@example.org', password: PASSWORD });
    for (const response of [wrong, unknown]) {
      expect(response.status).toBe(401);
      expect(response.headers['set-cookie']).toBeUndefined();
    }
    const { requestId: _one, ...said } = wrong.body;
    const { requestId: _two, ...saidToo } = unknown.body;
    expect(said).toEqual(saidToo);
    expect(said.code).toBe('wrong_sign_in');
    const refused = (await auditActs()).filter(({ act }) => act === 'sign-in refused');
    expect(refused.map(({ subject }) => subject)).toMatchObject([
      { email: 'lead@example.org' },
      { email: 'nobody@example.org' },
    ]);
  });

  test('does an unknown e-mail address the work of a comparison', async () => {
    // Processor time of this process, its threads among it: a busy machine does not show in it.
    const workOf = async (act: () => Promise<unknown>): Promise<number> => {
      const began = process.cpuUsage();
      await act();
      const { user, system } = process.cpuUsage(began);
      return user + system;
    };
    const refuse = (email: string) =>
      web.browser().post('/api/session').send({ email, password: 'not this one' }).expect(401);
    await refuse('warm-up@example.org');
    const comparison = await workOf(() => hashPassword('one comparison costs about as much as one hash'));
    const works: number[] = [];
    for (const email of ['x@example.org', 'y@example.org', 'z@example.org'])
      works.push(await workOf(async () => refuse(email)));
    // An answer without a comparison takes a fraction of one.
    expect(Math.min(...works)).toBeGreaterThan(comparison / 2);
  });

  test('keeps passwords as argon2id of the settled cost', async () => {
    const { rows } = await web.database.ownerDb.raw<{ rows: { password_hash: string }[] }>(
      'select password_hash from people',
    );
    expect(rows).toHaveLength(1);
    for (const row of rows) expect(row.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  test('tells every fault of what was typed at once', async () => {
    const response = await web
      .browser()
      .post('/api/session')
      .send({ email: 'no address', password: '', more: 1 })
      .expect(400);
    expect(response.body.problems).toEqual([
      { path: 'body.email', message: 'Type an e-mail address, such as name@example.org.' },
      { path: 'body.password', message: 'Type your password.' },
      { path: 'body.more', message: 'This is not asked for here.' },
    ]);
  });
});

describe('a session', () => {
  test('gets a new id at sign-in, so that one planted before is worth nothing', async () => {
    const first = await web
      .browser()
      .post('/api/session')
      .send({ email: 'lead@example.org', password: PASSWORD })
      .expect(200);
    const planted = cookieOf(first);
    const second = await supertest(web.app)
      .post('/api/session')
      .set({ 'Sec-Fetch-Site': 'same-origin', Cookie: planted })
      .send({ email: 'lead@example.org', password: PASSWORD })
      .expect(200);
    expect(cookieOf(second)).not.toBe(planted);
    const withPlanted = await supertest(web.app).get('/api/session').set('Cookie', planted).expect(200);
    expect(withPlanted.body.person).toBeNull();
    const withNew = await supertest(web.app).get('/api/session').set('Cookie', cookieOf(second)).expect(200);
    expect(withNew.body.person).not.toBeNull();
  });

  test('is not made for a visitor, nor from an id that the visitor chose', async () => {
    const before = await sessionRows();
    const response = await supertest(web.app)
      .get('/api/session')
      .set('Cookie', 'muslin_session=s%3Achosen.by-me')
      .expect(200);
    expect(response.body.person).toBeNull();
    expect(response.headers['set-cookie']).toBeUndefined();
    expect(await sessionRows()).toEqual(before);
  });

  test('ends on the server at sign-out', async () => {
    const signedIn = await web.browser().post('/api/session').send({ email: 'lead@example.org', password: PASSWORD });
    const cookie = cookieOf(signedIn);
    const before = (await sessionRows()).length;
    const signedOut = await supertest(web.app)
      .delete('/api/session')
      .set({ 'Sec-Fetch-Site': 'same-origin', Cookie: cookie })
      .expect(204);
    expect(signedOut.headers['set-cookie']?.[0]).toMatch(/^muslin_session=;/);
    expect(await sessionRows()).toHaveLength(before - 1);
    expect((await supertest(web.app).get('/api/session').set('Cookie', cookie)).body.person).toBeNull();
    expect((await auditActs()).at(-1)?.act).toBe('signed out');
  });

  test('is believed under an older secret while a newer one signs', async () => {
    const signedIn = await web.browser().post('/api/session').send({ email: 'lead@example.org', password: PASSWORD });
    const { createApp } = await import('../../../server/app.ts');
    const rotated = createApp({ ...web.deps, sessionSecrets: ['a newer secret', ...web.deps.sessionSecrets] });
    const replaced = createApp({ ...web.deps, sessionSecrets: ['a newer secret'] });
    const Cookie = cookieOf(signedIn);
    expect((await supertest(rotated).get('/api/session').set({ Cookie })).body.person).not.toBeNull();
    expect((await supertest(replaced).get('/api/session').set({ Cookie })).body.person).toBeNull();
  });
});

describe('guessing a password', () => {
  const guess = (email: string, address: string) =>
    web.browser().post('/api/session').set('X-Forwarded-For', address).send({ email, password: 'not this one' });

  /** Stands for the many guesses between, each of which costs a comparison. */
  const countAsIf = ({ counted, become }: { counted: number; become: number }) =>
    web.database.ownerDb.raw('update request_counts set requests = ? where requests = ? and minute = ?', [
      become,
      counted,
      now(),
    ]);

  test('is slowed after five tries from one address, says for how long, and goes on in the next minute', async () => {
    for (let tries = 0; tries < 5; tries++) await guess('lead@example.org', '192.0.2.1').expect(401);
    const refused = await guess('lead@example.org', '192.0.2.1').expect(429);
    expect(refused.body.code).toBe('too_many_requests');
    expect(refused.headers['retry-after']).toBe('60');
    // The right password too: otherwise the answer would tell it from the wrong ones.
    const right = { email: 'lead@example.org', password: PASSWORD };
    await web.browser().post('/api/session').set('X-Forwarded-For', '192.0.2.1').send(right).expect(429);
    offsetMs += 59_000;
    expect((await guess('lead@example.org', '192.0.2.1').expect(429)).headers['retry-after']).toBe('1');
    // Meanwhile the owner comes in from elsewhere.
    await web.browser().post('/api/session').set('X-Forwarded-For', '192.0.2.2').send(right).expect(200);
    offsetMs += 1_000;
    await web.browser().post('/api/session').set('X-Forwarded-For', '192.0.2.1').send(right).expect(200);
  });

  test('is forgiven when the right password comes within the five tries', async () => {
    const right = { email: 'lead@example.org', password: PASSWORD };
    for (let round = 0; round < 2; round++) {
      for (let tries = 0; tries < 4; tries++) await guess('lead@example.org', '192.0.2.1').expect(401);
      await web.browser().post('/api/session').set('X-Forwarded-For', '192.0.2.1').send(right).expect(200);
    }
  });

  test('at one account from many addresses is slowed too', async () => {
    for (let tries = 0; tries < 2; tries++) await guess('lead@example.org', `198.51.100.${tries}`).expect(401);
    await countAsIf({ counted: 2, become: 20 });
    await guess('lead@example.org', '198.51.100.99').expect(429);
    await guess('other@example.org', '198.51.100.99').expect(401);
  });

  test('at many accounts from one address is slowed too', async () => {
    for (let tries = 0; tries < 2; tries++) await guess(`person-${tries}@example.org`, '203.0.113.5').expect(401);
    await countAsIf({ counted: 2, become: 30 });
    await guess('person-31@example.org', '203.0.113.5').expect(429);
    await guess('person-31@example.org', '203.0.113.6').expect(401);
  });
});

describe('where a request says it comes from', () => {
  test('counts only when a trusted proxy says it', async () => {
    const { createApp } = await import('../../../server/app.ts');
    const untrusting = createApp({ ...web.deps, trustProxy: '10.0.0.0/8' });
    const from = (address: string) =>
      supertest(untrusting)
        .post('/api/session')
        .set({ 'Sec-Fetch-Site': 'same-origin', 'X-Forwarded-For': address })
        .send({ email: 'lead@example.org', password: 'not this one' });
    for (let tries = 0; tries < 5; tries++) await from(`192.0.2.${tries}`).expect(401);
    await from('192.0.2.77').expect(429);
    const { rows } = await web.database.ownerDb.raw<{ rows: { subject: { address: string } }[] }>(
      'select subject from audit_events order by id desc limit 1',
    );
    expect(rows[0]?.subject.address).toMatch(/127\.0\.0\.1$/);
  });
});
