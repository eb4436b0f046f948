import { generateSync } from 'otplib';
import supertest from 'supertest';
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

describe('another e-mail address', () => {
  test('holds once its link is followed; the old address is told', async () => {
    const { email, agent } = await person();
    const change = { password: PASSWORD, email: 'Moved@example.org' };
    await agent
      .post('/api/account/email')
      .send({ ...change, password: 'not this one' })
      .expect(400);
    await agent.post('/api/account/email').send(change).expect(204);
    await entry('moved@example.org').expect(401);
    const key = await lastKeyTo(web.database, 'moved@example.org');
    await web.browser().post('/api/email-confirmation').send({ key }).expect(204);
    await web.browser().post('/api/email-confirmation').send({ key }).expect(410);
    await entry('moved@example.org').expect(200);
    expect((await mailsTo(web.database, email)).at(-1)?.subject).toBe('Your e-mail address for Muslin was changed');
  });

  test('of somebody else is answered alike, and nothing is changed', async () => {
    const { agent } = await person();
    const owner = await person();
    await agent.post('/api/account/email').send({ password: PASSWORD, email: owner.email }).expect(204);
    const [mail, ...more] = await mailsTo(web.database, owner.email);
    expect(more).toEqual([]);
    expect(mail?.text).toContain('nothing was changed');
    expect(mail?.text).not.toContain('/new-address/');
  });
});

describe('sessions of an account', () => {
  test('are listed without their ids, and each can be ended; those of others are not there', async () => {
    const { email, agent } = await person();
    const phone = web.browser().set('User-Agent', 'A phone');
    await phone.post('/api/session').send({ email, password: PASSWORD }).expect(200);
    const { items } = (await agent.get('/api/account/sessions').expect(200)).body;
    expect(items).toHaveLength(2);
    const { rows } = await web.database.ownerDb.raw<{ rows: { sid: string }[] }>('select sid from sessions');
    for (const { sid } of rows) expect(JSON.stringify(items)).not.toContain(sid);
    const ofPhone = items.find(({ browser }: { browser: string | null }) => browser === 'A phone');
    expect(ofPhone).toMatchObject({ current: false, beganAt: clock.now().toISOString() });
    const stranger = await person();
    await stranger.agent.delete(`/api/account/sessions/${ofPhone.id}`).expect(404);
    await agent.delete(`/api/account/sessions/${ofPhone.id}`).expect(204);
    expect((await phone.get('/api/session')).body.person).toBeNull();
    await agent.delete('/api/account/sessions').expect(204);
    expect((await agent.get('/api/account/sessions')).body.items).toHaveLength(1);
  });

  test('are worth nothing with a cookie that was tampered with, has expired, or was stolen and then ended', async () => {
    const { email, id } = await person();
    const signedIn = await entry(email).expect(200);
    const cookie = (signedIn.headers['set-cookie']?.[0] ?? '').split(';')[0] ?? '';
    const whoIs = async (Cookie: string) =>
      (await supertest(web.app).get('/api/session').set('Cookie', Cookie).expect(200)).body.person;
    expect(await whoIs(cookie)).not.toBeNull();
    expect(await whoIs(`${cookie.slice(0, -2)}AA`)).toBeNull();
    expect(await whoIs(cookie.replace(/s%3A./, 's%3AX'))).toBeNull();
    await web.database.ownerDb.raw(`update sessions set expire = now() - interval '1 second' where person_id = ?`, [
      id,
    ]);
    expect(await whoIs(cookie)).toBeNull();
  });
});

describe('two-factor sign-in', () => {
  const codeAt = (secret: string) => generateSync({ secret, epoch: Math.floor(clock.now().getTime() / 1000) });

  test('begins with a confirmed code, asks for one at every sign-in, and takes none twice', async () => {
    const { email, agent } = await person();
    await agent.post('/api/account/two-factor').send({ password: 'not this one' }).expect(400);
    const { secret, uri } = (await agent.post('/api/account/two-factor').send({ password: PASSWORD }).expect(200)).body;
    expect(uri).toMatch(/^otpauth:\/\/totp\/Muslin/);
    const { rows } = await web.database.ownerDb.raw('select two_factor_secret from people');
    expect(JSON.stringify(rows)).not.toContain(secret);
    await agent.put('/api/account/two-factor').send({ code: '000000' }).expect(400);
    await entry(email).expect(200);
    const confirmed = await agent
      .put('/api/account/two-factor')
      .send({ code: codeAt(secret) })
      .expect(200);
    expect(confirmed.body.recoveryCodes).toHaveLength(10);
    expect(new Set(confirmed.body.recoveryCodes).size).toBe(10);

    clock.moveMs(MINUTE_MS);
    const asked = await entry(email).expect(401);
    expect(asked.body.code).toBe('code_needed');
    expect(asked.headers['set-cookie']).toBeUndefined();
    // A wrong password is told as such, whatever the code: the code tells nothing of the password.
    expect((await entry(email, { password: 'not this one', code: codeAt(secret) }).expect(401)).body.code).toBe(
      'wrong_sign_in',
    );
    const code = codeAt(secret);
    await entry(email, { code: `${code.slice(0, 3)} ${code.slice(3)}` }).expect(200);
    expect((await entry(email, { code }).expect(401)).body.code).toBe('code_needed');

    const [recovery = ''] = confirmed.body.recoveryCodes;
    clock.moveMs(MINUTE_MS);
    await entry(email, { code: recovery.toUpperCase() }).expect(200);
    await entry(email, { code: recovery }).expect(401);
    expect((await agent.get('/api/account').expect(200)).body.twoFactor).toEqual({ on: true, recoveryCodesLeft: 9 });
    const renewed = await agent.post('/api/account/recovery-codes').send({ password: PASSWORD }).expect(200);
    expect(renewed.body.recoveryCodes).not.toContain(confirmed.body.recoveryCodes[1]);
    await agent.post('/api/account/two-factor').send({ password: PASSWORD }).expect(409);
    await agent.post('/api/account/two-factor/removal').send({ password: PASSWORD }).expect(204);
    clock.moveMs(MINUTE_MS);
    await entry(email).expect(200);
  });

  test('of RFC 6238 gives the codes that the standard prints', () => {
    // Appendix B of RFC 6238, SHA-1, the last six of eight figures.
    const secret = 'GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ';
    const printed = [
      [59, '287082'],
      [1_111_111_109, '081804'],
      [1_234_567_890, '005924'],
      [2_000_000_000, '279037'],
    ] as const;
    expect(printed.map(([epoch]) => generateSync({ secret, epoch }))).toEqual(printed.map(([, code]) => code));
  });
});

describe('one’s own account', () => {
  test('takes a name and the notices that are off, and nothing else', async () => {
    const { agent, email } = await person();
    const other = await person();
    const grabbing = { name: 'Ada', email: 'x@example.org', id: other.id, role: 'lead' };
    const { body } = await agent.patch('/api/account').send(grabbing).expect(400);
    expect(body.problems.map(({ path }: { path: string }) => path)).toEqual(['body.email', 'body.id', 'body.role']);
    await agent.patch('/api/account').send({ name: 'Ada\r\nBcc: all@example.org' }).expect(400);
    await agent.patch('/api/account').send({ name: ' Ada ' }).expect(200);
    const changed = await agent
      .put('/api/account/notices-off')
      .send({ off: ['comment', 'comment', 'signed off'] })
      .expect(200);
    expect(changed.body).toMatchObject({ name: 'Ada', email, noticesOff: ['comment', 'signed off'] });
    await agent
      .put('/api/account/notices-off')
      .send({ off: ['everything'] })
      .expect(400);
  });
});

test('nothing was logged as a fault of ours', () => {
  expect(web.log.errors).toEqual([]);
});
