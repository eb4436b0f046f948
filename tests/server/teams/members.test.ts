import { afterAll, afterEach, beforeAll, describe, expect, it, test } from 'vitest';
import { eventually } from '../../support/eventually.ts';
import { lastKeyTo } from '../../support/mail-box.ts';
import type { MovingClock } from '../../support/moving-clock.ts';
import type { WebForTests } from '../../support/open-web.ts';
import { openTeamOffice, type TeamOffice } from '../../support/team-office.ts';

let office: TeamOffice;
let web: WebForTests;
let base: string;
let clock: MovingClock;

beforeAll(async () => {
  office = await openTeamOffice();
  ({ web, base, clock } = office);
});
afterEach(() => {
  expect(web.log.errors).toEqual([]);
  office.nextMinute();
});
afterAll(() => web.close());

describe('the people of a team', () => {
  it('may have another role from the next request on, and none that is not one', async () => {
    const { personId, agent } = await office.member('viewer');
    await agent.post(`${base}/programmes`).send({ name: 'Halls' }).expect(403);
    await office.lead().patch(`${base}/members/${personId}`).send({ role: 'planner' }).expect(200);
    await agent.post(`${base}/programmes`).send({ name: 'Halls' }).expect(200);
    await office.lead().patch(`${base}/members/${personId}`).send({ role: 'owner' }).expect(400);
    const { items } = (await agent.get(`${base}/members`).expect(200)).body;
    expect(items.map(({ email }: { email: string | null }) => email)).toEqual(items.map(() => null));
  });

  it('from outside are in until the end of their last day, and not a moment longer', async () => {
    const { personId, agent } = await office.member('engineer');
    const lastDay = clock.now().toISOString().slice(0, 10);
    const { body } = await office.lead().patch(`${base}/members/${personId}`).send({ lastDay }).expect(200);
    expect(body).toMatchObject({ lastDay, ended: false });
    await office.lead().patch(`${base}/members/${personId}`).send({ role: 'lead' }).expect(400);
    await agent.get(`${base}/members`).expect(200);
    await clock.at(`${lastDay}T23:59:59.999Z`, () => agent.get(`${base}/members`).expect(200));
    await clock.at(`${lastDay}T24:00:00.000Z`, async () => {
      await agent.get(`${base}/members`).expect(404);
      expect((await agent.get('/api/session')).body.memberships).toEqual([]);
    });
  });

  it('never lose their last lead, even when two leave at once', async () => {
    await office.lead().delete(`${base}/membership`).expect(409);
    await office.lead().patch(`${base}/members/${office.leadId}`).send({ role: 'viewer' }).expect(409);
    const second = await office.member('lead');
    const answers = await Promise.all([
      office.lead().delete(`${base}/members/${second.personId}`),
      second.agent.delete(`${base}/members/${office.leadId}`),
    ]);
    // The second may be refused as a lead who is one no longer (404) or as the remover of the last (409).
    expect(answers.filter(({ status }) => status === 204)).toHaveLength(1);
    const { rows } = await web.database.ownerDb.raw<{ rows: { person_id: string }[] }>(
      `select person_id from memberships where team_id = ? and role = 'lead'`,
      [office.teamId],
    );
    expect(rows).toHaveLength(1);
    if (rows[0]?.person_id !== office.leadId) {
      await web.addMember({ teamId: office.teamId, personId: office.leadId, role: 'lead' });
    }
  });

  it('can be signed out everywhere and be taken out by a lead of theirs, and by no other (J8)', async () => {
    const { personId, agent, email } = await office.member('planner');
    const otherId = await web.makePerson('foreign@example.org');
    const foreign = await web.makeTeam(otherId);
    const other = await web.signIn('foreign@example.org');
    await other.delete(`/api/teams/${foreign.teamId}/members/${personId}/sessions`).expect(404);
    await other.delete(`${base}/members/${personId}/sessions`).expect(404);
    await office.lead().delete(`${base}/members/${personId}/sessions`).expect(204);
    expect((await agent.get('/api/session')).body.person).toBeNull();
    const again = await web.signIn(email);
    await office.lead().delete(`${base}/members/${personId}`).expect(204);
    await again.get(`${base}/members`).expect(404);
    const { rows } = await web.database.ownerDb.raw<{ rows: { act: string }[] }>(
      'select act from audit_events where team_id = ? order by id',
      [office.teamId],
    );
    const acts = new Set(rows.map(({ act }) => act));
    for (const act of ['member changed', 'sessions of a member ended', 'member removed']) expect(acts).toContain(act);
  });
});

test('whoever looks at the people of a team is told when somebody joins, changes or goes, and nobody else is', async () => {
  const stop = new AbortController();
  const other = await web.makeTeam(await web.makePerson('other@example.org'));
  const told: string[] = [];
  const following = async (teamId: string, name: string): Promise<void> => {
    for await (const { kind } of web.deps.feed.watch(teamId, stop.signal)) told.push(`${name}: ${kind}`);
  };
  const both = [following(office.teamId, 'ours'), following(other.teamId, 'theirs')];
  await office.invite('joining@example.org');
  await office.accept(await lastKeyTo(web.database, 'joining@example.org')).expect(200);
  const { personId } = await office.member('viewer');
  await office.lead().patch(`${base}/members/${personId}`).send({ role: 'planner' }).expect(200);
  await office.lead().delete(`${base}/members/${personId}`).expect(204);
  await eventually('four events', async () => told.length >= 4);
  stop.abort();
  await Promise.all(both);
  expect(told).toEqual(Array.from({ length: 4 }, () => 'ours: people'));
});

describe('a person', () => {
  it('makes a team of their own and leads it', async () => {
    const { agent } = await office.member('viewer');
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
