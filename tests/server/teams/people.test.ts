import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { lastKeyTo, mailsTo } from '../../support/mail-box.ts';
import { type Agent, openWeb, PASSWORD, type WebForTests } from '../../support/open-web.ts';

const START = new Date('2026-03-01T10:00:00Z').getTime();
let offsetMs = 0;
const now = () => new Date(START + offsetMs);

let web: WebForTests;
let lead: Agent;
let leadId: string;
let teamId: string;
let programmeId: string;
let base: string;

beforeAll(async () => {
  web = await openWeb({ now });
  leadId = await web.makePerson('lead@example.org');
  ({ teamId, programmeId } = await web.makeTeam(leadId));
  base = `/api/teams/${teamId}`;
  lead = await web.signIn('lead@example.org');
});
afterEach(() => {
  expect(web.log.errors).toEqual([]);
  offsetMs += 60_000;
});
afterAll(() => web.close());

const invite = async (email: string, more: Record<string, unknown> = {}) =>
  (
    await lead
      .post(`${base}/invitations`)
      .send({ email, role: 'planner', lastDay: null, ...more })
      .expect(200)
  ).body;
const accept = (key: string, more: Record<string, unknown> = {}) =>
  web
    .browser()
    .post('/api/invitations/acceptance')
    .send({ key, name: 'New Person', password: PASSWORD, ...more });
let members = 0;
async function member(role: 'viewer' | 'planner' | 'engineer' | 'lead') {
  members += 1;
  const email = `member-${members}@example.org`;
  const personId = await web.makePerson(email);
  await web.addMember({ teamId, personId, role });
  return { personId, email, agent: await web.signIn(email) };
}

describe('an invitation', () => {
  it('makes the account that it was sent to, with its role, and signs the person in', async () => {
    const invitation = await invite('New@Example.org');
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
    expect(body).toMatchObject({ person: { email: 'new@example.org' }, memberships: [{ teamId, role: 'planner' }] });
    expect((await browser.get(`${base}/members`).expect(200)).body.items).toHaveLength(2);
    await accept(key).expect(410);
    await lead
      .post(`${base}/invitations`)
      .send({ email: 'new@example.org', role: 'viewer', lastDay: null })
      .expect(409);
  });

  it('takes nothing but a name and a password: address, role and team stand in it', async () => {
    await invite('mass@example.org');
    const key = await lastKeyTo(web.database, 'mass@example.org');
    const { body } = await accept(key, { role: 'lead', email: 'other@example.org', teamId }).expect(400);
    expect(body.problems.map(({ path }: { path: string }) => path)).toEqual(['body.role', 'body.email', 'body.teamId']);
    await accept(key, { password: 'iloveyou1234' }).expect(400);
    await accept(key).expect(200);
  });

  it('that several use at once lets one of them in', async () => {
    await invite('many@example.org');
    const key = await lastKeyTo(web.database, 'many@example.org');
    const answers = await Promise.all([1, 2, 3].map((each) => accept(key, { name: `Person ${each}` })));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 410, 410]);
    const { rows } = await web.database.ownerDb.raw(`select id from people where email = 'many@example.org'`);
    expect(rows).toHaveLength(1);
  });

  it('stops working when it is sent again, taken back, or two weeks old', async () => {
    const { id } = await invite('slow@example.org');
    const first = await lastKeyTo(web.database, 'slow@example.org');
    await lead
      .post(`${base}/invitations`)
      .send({ email: 'slow@example.org', role: 'viewer', lastDay: null })
      .expect(409);
    await lead.post(`${base}/invitations/${id}/mail`).expect(200);
    await accept(first).expect(410);
    const second = await lastKeyTo(web.database, 'slow@example.org');
    offsetMs += 15 * 24 * 3_600_000;
    lead = await web.signIn('lead@example.org');
    await accept(second).expect(410);
    const { items } = (await lead.get(`${base}/invitations`).expect(200)).body;
    expect(items.find((each: { id: string }) => each.id === id)).toMatchObject({ state: 'expired' });
    await lead.post(`${base}/invitations/${id}/mail`).expect(200);
    const third = await lastKeyTo(web.database, 'slow@example.org');
    expect((await lead.delete(`${base}/invitations/${id}`).expect(200)).body.state).toBe('revoked');
    await accept(third).expect(410);
    await lead.delete(`${base}/invitations/${id}`).expect(409);
    await lead.post(`${base}/invitations/${id}/mail`).expect(409);
  });

  it('of somebody with an account is theirs alone to accept, and no link for it lies in the outbox', async () => {
    const email = 'elsewhere@example.org';
    await web.makePerson(email);
    const { id } = await invite(email, { role: 'engineer' });
    expect((await mailsTo(web.database, email)).map(({ text }) => text).join()).not.toMatch(/invitations\/[\w-]{43}/);
    const outbox = (await lead.get(`${base}/mails`).expect(200)).body;
    expect(JSON.stringify(outbox.items)).not.toContain(email);
    await lead.post(`/api/account/invitations/${id}/acceptance`).expect(410);
    const person = await web.signIn(email);
    expect((await person.get('/api/account/notices').expect(200)).body).toMatchObject({
      unread: 1,
      items: [{ kind: 'invitation' }],
    });
    expect((await person.get('/api/account/invitations').expect(200)).body.items).toMatchObject([
      { id, role: 'engineer' },
    ]);
    const { body } = await person.post(`/api/account/invitations/${id}/acceptance`).expect(200);
    expect(body.memberships).toMatchObject([{ teamId, role: 'engineer' }]);
    await person.post('/api/account/notices/reading').expect(204);
    expect((await person.get('/api/account/notices')).body.unread).toBe(0);
  });

  it('is told of in the outbox of the leads while no mail is sent, with its link', async () => {
    await invite('waiting@example.org');
    const { items, sends } = (await lead.get(`${base}/mails`).expect(200)).body;
    expect(sends).toBe(false);
    expect(items[0]).toMatchObject({ recipient: 'waiting@example.org', subject: 'Invitation into the team Team' });
    expect(items[0].text).toMatch(/https:\/\/muslin\.example\/invitations\/[\w-]{43}/);
    await web.browser().post('/api/password-reset/request').send({ email: 'lead@example.org' }).expect(204);
    expect(JSON.stringify((await lead.get(`${base}/mails`)).body)).not.toContain('new-password');
  });
});

describe('the people of a team', () => {
  it('may have another role from the next request on, and none that is not one', async () => {
    const { personId, agent } = await member('viewer');
    await agent.post(`${base}/programmes`).send({ name: 'Halls' }).expect(403);
    await lead.patch(`${base}/members/${personId}`).send({ role: 'planner' }).expect(200);
    await agent.post(`${base}/programmes`).send({ name: 'Halls' }).expect(200);
    await lead.patch(`${base}/members/${personId}`).send({ role: 'owner' }).expect(400);
    const { items } = (await agent.get(`${base}/members`).expect(200)).body;
    expect(items.map(({ email }: { email: string | null }) => email)).toEqual(items.map(() => null));
  });

  it('from outside are in until the end of their last day, and not a moment longer', async () => {
    const { personId, agent } = await member('engineer');
    const lastDay = now().toISOString().slice(0, 10);
    const { body } = await lead.patch(`${base}/members/${personId}`).send({ lastDay }).expect(200);
    expect(body).toMatchObject({ lastDay, ended: false });
    await lead.patch(`${base}/members/${personId}`).send({ role: 'lead' }).expect(400);
    await agent.get(`${base}/members`).expect(200);
    const kept = offsetMs;
    offsetMs = Date.parse(`${lastDay}T23:59:59.999Z`) - START;
    await agent.get(`${base}/members`).expect(200);
    offsetMs += 1;
    await agent.get(`${base}/members`).expect(404);
    expect((await agent.get('/api/session')).body.memberships).toEqual([]);
    offsetMs = kept;
  });

  it('never lose their last lead, even when two leave at once', async () => {
    await lead.delete(`${base}/membership`).expect(409);
    await lead.patch(`${base}/members/${leadId}`).send({ role: 'viewer' }).expect(409);
    const second = await member('lead');
    const answers = await Promise.all([
      lead.delete(`${base}/members/${second.personId}`),
      second.agent.delete(`${base}/members/${leadId}`),
    ]);
    // The second may be refused as a lead who is one no longer (404) or as the remover of the last (409).
    expect(answers.filter(({ status }) => status === 204)).toHaveLength(1);
    const { rows } = await web.database.ownerDb.raw<{ rows: { person_id: string }[] }>(
      `select person_id from memberships where team_id = ? and role = 'lead'`,
      [teamId],
    );
    expect(rows).toHaveLength(1);
    if (rows[0]?.person_id !== leadId) {
      await web.addMember({ teamId, personId: leadId, role: 'lead' });
    }
  });

  it('can be signed out everywhere and be taken out by a lead of theirs, and by no other (J8)', async () => {
    const { personId, agent, email } = await member('planner');
    const otherId = await web.makePerson('foreign@example.org');
    const foreign = await web.makeTeam(otherId);
    const other = await web.signIn('foreign@example.org');
    await other.delete(`/api/teams/${foreign.teamId}/members/${personId}/sessions`).expect(404);
    await other.delete(`${base}/members/${personId}/sessions`).expect(404);
    await lead.delete(`${base}/members/${personId}/sessions`).expect(204);
    expect((await agent.get('/api/session')).body.person).toBeNull();
    const again = await web.signIn(email);
    await lead.delete(`${base}/members/${personId}`).expect(204);
    await again.get(`${base}/members`).expect(404);
    const { rows } = await web.database.ownerDb.raw<{ rows: { act: string }[] }>(
      'select act from audit_events where team_id = ? order by id',
      [teamId],
    );
    const acts = new Set(rows.map(({ act }) => act));
    for (const act of [
      'person invited',
      'invitation accepted',
      'member changed',
      'sessions of a member ended',
      'member removed',
    ])
      expect(acts).toContain(act);
  });
});

describe('a programme', () => {
  it('that is restricted is there for its members and the leads alone', async () => {
    const inside = await member('planner');
    const outside = await member('planner');
    const open = `${base}/programmes/${programmeId}`;
    const set = (restricted: boolean, memberIds: readonly string[]) =>
      lead.put(`${open}/members`).send({ restricted, memberIds });
    await set(true, [inside.personId]).expect(200);
    await inside.agent.get(`${open}/briefs`).expect(200);
    await lead.get(`${open}/briefs`).expect(200);
    await outside.agent.get(`${open}/briefs`).expect(404);
    await outside.agent.get(`${base}/programmes/${programmeId.toUpperCase()}/briefs`).expect(404);
    const site = { name: 'Hidden hall', latitude: -25, longitude: 25, elevationM: 1200, designLoadKw: null };
    await lead.post(`${open}/sites`).send(site).expect(200);
    const found = async (agent: Agent) =>
      (await agent.get(`${base}/places?text=hidden`).expect(200)).body.places.map(({ name }: { name: string }) => name);
    expect(await found(inside.agent)).toContain('Hidden hall');
    expect(await found(outside.agent)).not.toContain('Hidden hall');
    await outside.agent.patch(open).send({ name: 'Mine' }).expect(404);
    const ids = async (agent: Agent) =>
      (await agent.get(`${base}/programmes`).expect(200)).body.items.map(({ id }: { id: string }) => id);
    expect(await ids(inside.agent)).toContain(programmeId);
    expect(await ids(outside.agent)).not.toContain(programmeId);
    const session = (await outside.agent.get('/api/session')).body;
    expect(JSON.stringify(session.memberships)).not.toContain(programmeId);
    const stranger = await web.makePerson('stranger@example.org');
    const { body } = await set(true, [stranger]).expect(400);
    expect(body.problems).toMatchObject([{ path: 'body.memberIds' }]);
    await set(false, []).expect(200);
    await outside.agent.get(`${open}/briefs`).expect(200);
  });

  it('has a name that can be changed, and begins with a brief', async () => {
    const { body } = await lead.post(`${base}/programmes`).send({ name: 'Workshops' }).expect(200);
    const renamed = await lead
      .patch(`${base}/programmes/${body.id}`)
      .send({ name: 'Workshops of the north' })
      .expect(200);
    expect(renamed.body).toMatchObject({ name: 'Workshops of the north', restricted: false, memberIds: [] });
    expect((await lead.get(`${base}/programmes/${body.id}/briefs`).expect(200)).body.items).toHaveLength(1);
  });
});

describe('a person', () => {
  it('makes a team of their own and leads it', async () => {
    const { agent } = await member('viewer');
    const { body } = await agent.post('/api/teams').send({ name: 'A second team' }).expect(200);
    const session = (await agent.get('/api/session')).body;
    expect(session.memberships).toHaveLength(2);
    expect(session.memberships.find((each: { teamId: string }) => each.teamId === body.teamId)).toMatchObject({
      role: 'lead',
      teamName: 'A second team',
      programmes: [{ name: 'First programme' }],
    });
    await agent.patch(`/api/teams/${body.teamId}`).send({ name: 'Renamed' }).expect(204);
    await agent.delete(`${base}/membership`).expect(204);
    expect((await agent.get('/api/session')).body.memberships).toMatchObject([{ teamName: 'Renamed' }]);
  });
});
