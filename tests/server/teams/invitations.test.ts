import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { lastKeyTo, mailsTo } from '../../support/mail-box.ts';
import { DAY_MS } from '../../support/moving-clock.ts';
import { PASSWORD, type WebForTests } from '../../support/open-web.ts';
import { openTeamOffice, type TeamOffice } from '../../support/team-office.ts';

let office: TeamOffice;
let web: WebForTests;
let base: string;

beforeAll(async () => {
  office = await openTeamOffice();
  ({ web, base } = office);
});
afterEach(() => {
  expect(web.log.errors).toEqual([]);
  office.nextMinute();
});
afterAll(() => web.close());

describe('an invitation', () => {
  it('makes the account that it was sent to, with its role, and signs the person in', async () => {
    const invitation = await office.invite('New@Example.org');
    expect(invitation).toMatchObject({ email: 'new@example.org', role: 'planner', state: 'open' });
    const key = await lastKeyTo(web.database, 'new@example.org');
    const opened = await web.browser().post('/api/invitations/opening').send({ key }).expect(200);
    expect(opened.body).toMatchObject({
      teamName: 'Team',
      role: 'planner',
      email: 'new@example.org',
      hasAccount: false,
    });
    const browser = web.browser();
    const { body } = await browser
      .post('/api/invitations/acceptance')
      .send({ key, name: 'New Person', password: PASSWORD })
      .expect(200);
    expect(body).toMatchObject({
      person: { email: 'new@example.org' },
      memberships: [{ teamId: office.teamId, role: 'planner' }],
    });
    expect((await browser.get(`${base}/members`).expect(200)).body.items).toHaveLength(2);
    await office.accept(key).expect(410);
    await office
      .lead()
      .post(`${base}/invitations`)
      .send({ email: 'new@example.org', role: 'viewer', lastDay: null })
      .expect(409);
  });

  it('takes nothing but a name and a password: address, role and team stand in it', async () => {
    await office.invite('mass@example.org');
    const key = await lastKeyTo(web.database, 'mass@example.org');
    const { body } = await office
      .accept(key, { role: 'lead', email: 'other@example.org', teamId: office.teamId })
      .expect(400);
    expect(body.problems.map(({ path }: { path: string }) => path)).toEqual(['body.role', 'body.email', 'body.teamId']);
    await office.accept(key, { password: 'iloveyou1234' }).expect(400);
    await office.accept(key).expect(200);
  });

  it('that several use at once lets one of them in', async () => {
    await office.invite('many@example.org');
    const key = await lastKeyTo(web.database, 'many@example.org');
    const answers = await Promise.all([1, 2, 3].map((each) => office.accept(key, { name: `Person ${each}` })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 410, 410]);
    const { rows } = await web.database.ownerDb.raw(`select id from people where email = 'many@example.org'`);
    expect(rows).toHaveLength(1);
  });

  it('stops working when it is sent again, taken back, or two weeks old', async () => {
    const { id } = await office.invite('slow@example.org');
    const first = await lastKeyTo(web.database, 'slow@example.org');
    await office
      .lead()
      .post(`${base}/invitations`)
      .send({ email: 'slow@example.org', role: 'viewer', lastDay: null })
      .expect(409);
    await office.lead().post(`${base}/invitations/${id}/mail`).expect(200);
    await office.accept(first).expect(410);
    const second = await lastKeyTo(web.database, 'slow@example.org');
    office.clock.moveMs(15 * DAY_MS);
    await office.signLeadInAgain();
    await office.accept(second).expect(410);
    const { items } = (await office.lead().get(`${base}/invitations`).expect(200)).body;
    expect(items.find((each: { id: string }) => each.id === id)).toMatchObject({ state: 'expired' });
    await office.lead().post(`${base}/invitations/${id}/mail`).expect(200);
    const third = await lastKeyTo(web.database, 'slow@example.org');
    expect((await office.lead().delete(`${base}/invitations/${id}`).expect(200)).body.state).toBe('revoked');
    await office.accept(third).expect(410);
    await office.lead().delete(`${base}/invitations/${id}`).expect(409);
    await office.lead().post(`${base}/invitations/${id}/mail`).expect(409);
  });

  it('of somebody with an account is theirs alone to accept, and no link for it lies in the outbox', async () => {
    const email = 'elsewhere@example.org';
    await web.makePerson(email);
    const { id } = await office.invite(email, { role: 'engineer' });
    expect((await mailsTo(web.database, email)).map(({ text }) => text).join()).not.toMatch(/invitations\/[\w-]{43}/);
    const outbox = (await office.lead().get(`${base}/mails`).expect(200)).body;
    expect(JSON.stringify(outbox.items)).not.toContain(email);
    await office.lead().post(`/api/account/invitations/${id}/acceptance`).expect(410);
    const person = await web.signIn(email);
    expect((await person.get('/api/account/notices').expect(200)).body).toMatchObject({
      unread: 1,
      items: [{ kind: 'invitation' }],
    });
    expect((await person.get('/api/account/invitations').expect(200)).body.items).toMatchObject([
      { id, role: 'engineer' },
    ]);
    const { body } = await person.post(`/api/account/invitations/${id}/acceptance`).expect(200);
    expect(body.memberships).toMatchObject([{ teamId: office.teamId, role: 'engineer' }]);
    await person.post('/api/account/notices/reading').expect(204);
    expect((await person.get('/api/account/notices')).body.unread).toBe(0);
  });

  it('is told of in the outbox of the leads while no mail is sent, with its link', async () => {
    await office.invite('waiting@example.org');
    const { items, sends } = (await office.lead().get(`${base}/mails`).expect(200)).body;
    expect(sends).toBe(false);
    expect(items[0]).toMatchObject({ recipient: 'waiting@example.org', subject: 'Invitation into the team Team' });
    expect(items[0].text).toMatch(/https:\/\/muslin\.example\/invitations\/[\w-]{43}/);
    await web.browser().post('/api/password-reset/request').send({ email: 'lead@example.org' }).expect(204);
    expect(JSON.stringify((await office.lead().get(`${base}/mails`)).body)).not.toContain('new-password');
  });
});
