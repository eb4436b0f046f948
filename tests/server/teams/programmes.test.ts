import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { Agent, WebForTests } from '../../support/open-web.ts';
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

describe('a programme', () => {
  it('that is restricted is there for its members and the leads alone', async () => {
    const inside = await office.member('planner');
    const outside = await office.member('planner');
    const open = `${base}/programmes/${office.programmeId}`;
    const set = (restricted: boolean, memberIds: readonly string[]) =>
      office.lead().put(`${open}/members`).send({ restricted, memberIds });
    await set(true, [inside.personId]).expect(200);
    await inside.agent.get(`${open}/briefs`).expect(200);
    await office.lead().get(`${open}/briefs`).expect(200);
    await outside.agent.get(`${open}/briefs`).expect(404);
    await outside.agent.get(`${base}/programmes/${office.programmeId.toUpperCase()}/briefs`).expect(404);
    const site = { name: 'Hidden hall', latitude: -25, longitude: 25, elevationM: 1200, designLoadKw: null };
    await office.lead().post(`${open}/sites`).send(site).expect(200);
    const found = async (agent: Agent) =>
      (await agent.get(`${base}/places?text=hidden`).expect(200)).body.places.map(({ name }: { name: string }) => name);
    expect(await found(inside.agent)).toContain('Hidden hall');
    expect(await found(outside.agent)).not.toContain('Hidden hall');
    await outside.agent.patch(open).send({ name: 'Mine' }).expect(404);
    const ids = async (agent: Agent) =>
      (await agent.get(`${base}/programmes`).expect(200)).body.items.map(({ id }: { id: string }) => id);
    expect(await ids(inside.agent)).toContain(office.programmeId);
    expect(await ids(outside.agent)).not.toContain(office.programmeId);
    const session = (await outside.agent.get('/api/session')).body;
    expect(JSON.stringify(session.memberships)).not.toContain(office.programmeId);
    const stranger = await web.makePerson('stranger@example.org');
    const { body } = await set(true, [stranger]).expect(400);
    expect(body.problems).toMatchObject([{ path: 'body.memberIds' }]);
    await set(false, []).expect(200);
    await outside.agent.get(`${open}/briefs`).expect(200);
  });

  it('has a name that can be changed, and begins with a brief', async () => {
    const { body } = await office.lead().post(`${base}/programmes`).send({ name: 'Workshops' }).expect(200);
    const renamed = await office
      .lead()
      .patch(`${base}/programmes/${body.id}`)
      .send({ name: 'Workshops of the north' })
      .expect(200);
    expect(renamed.body).toMatchObject({ name: 'Workshops of the north', restricted: false, memberIds: [] });
    expect((await office.lead().get(`${base}/programmes/${body.id}/briefs`).expect(200)).body.items).toHaveLength(1);
  });
});
