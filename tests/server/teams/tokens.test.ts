import supertest from 'supertest';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';

let road: Road;
let team: RoadTeam;
let base: string;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  base = `/api/teams/${team.teamId}`;
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const order = async (scopes: readonly string[], days = 30) =>
  (await team.lead.agent.post(`${base}/tokens`).send({ name: 'Nightly', scopes, days }).expect(200)).body;
const program = (token: string) => supertest.agent(road.app).set('Authorization', `Bearer ${token}`);
const epw = demoEpw(0);

describe('an API token', () => {
  it('is shown once, and only its hash is kept', async () => {
    const { token, made } = await order(['weather:upload', 'weather:read', 'weather:read']);
    expect(token).toMatch(/^muslin_[\w-]{43}$/);
    expect(made).toMatchObject({
      name: 'Nightly',
      scopes: ['weather:upload', 'weather:read'],
      state: 'valid',
      lastUsedAt: null,
    });
    const list = await team.lead.agent.get(`${base}/tokens`).expect(200);
    expect(JSON.stringify(list.body)).not.toContain(token);
    const { rows } = await road.db.raw<{ rows: { kept: string }[] }>(
      'select to_jsonb(api_tokens)::text as kept from api_tokens',
    );
    expect(rows.length).toBeGreaterThan(0);
    for (const { kept } of rows) expect(kept).not.toContain(token.slice(7));
  });

  it('lets a program upload nightly, read what was found, and read scores as JSON (J7)', async () => {
    await road.startWorker();
    const { token } = await order(['weather:upload', 'weather:read', 'results:read']);
    const script = program(token);
    const { body } = await script
      .post(`${base}/weather-files`)
      .attach('file', Buffer.from(epw.text), epw.name)
      .expect(200);
    const record = await eventually('the end of reading', async () => {
      const answer = await script.get(`${base}/weather-files/${body.file.id}`).expect(200);
      return answer.body.file.status === 'review' && answer.body;
    });
    expect(record.findings.length).toBeGreaterThan(0);
    // Deciding is for people.
    const accepting = await script.post(`${base}/weather-files/${body.file.id}/acceptance`).expect(403);
    expect(accepting.body.message).toContain('token was not made for that');
    await team.lead.agent.post(`${base}/weather-files/${body.file.id}/acceptance`).expect(200);
    const map = await eventually('the score', async () => {
      const answer = await script.get(`${base}/programmes/${team.programmeId}/map`).expect(200);
      return answer.body.pending === 0 && answer.body;
    });
    expect(map.stations[0].score).toBeGreaterThanOrEqual(0);
    const { items } = (await team.lead.agent.get(`${base}/tokens`).expect(200)).body;
    expect(items[0].lastUsedAt).not.toBeNull();
    const { rows } = await road.db.raw<{ rows: { subject: { tokenId: string } }[] }>(
      `select subject from audit_events where act = 'weather file uploaded'`,
    );
    expect(rows[0]?.subject.tokenId).toBe(items[0].id);
  });

  it('is nothing once it is revoked, expired, damaged, or its maker no longer leads', async () => {
    const { token, made } = await order(['weather:read']);
    const list = `${base}/weather-files`;
    await program(token).get(list).expect(200);
    for (const wrong of [token.slice(0, -1), `${token}x`, token.toUpperCase(), token.replace('muslin_', ''), '']) {
      await program(wrong).get(list).expect(401);
    }
    const revoked = await team.lead.agent.delete(`${base}/tokens/${made.id}`).expect(200);
    expect(revoked.body.state).toBe('revoked');
    await program(token).get(list).expect(401);
    await team.lead.agent.delete(`${base}/tokens/${made.id}`).expect(200);

    const other = await order(['weather:read']);
    await road.db.raw(`update api_tokens set made_at = now() - interval '2 days', expires_at = now() where id = ?`, [
      other.made.id,
    ]);
    await program(other.token).get(list).expect(401);

    const third = await order(['weather:read']);
    await road.db.raw(`update memberships set role = 'planner' where person_id = ?`, [team.lead.personId]);
    await program(third.token).get(list).expect(401);
    await road.db.raw(`update memberships set role = 'lead' where person_id = ?`, [team.lead.personId]);
    await program(third.token).get(list).expect(200);
  });

  it('opens no other team', async () => {
    const { token } = await order(['weather:read', 'results:read', 'weather:upload']);
    const other = await road.makeTeam('Southern offices');
    await program(token).get(`/api/teams/${other.teamId}/weather-files`).expect(404);
    await other.lead.agent
      .delete(`/api/teams/${other.teamId}/tokens/${(await order(['weather:read'])).made.id}`)
      .expect(404);
  });

  it('is refused with every fault located', async () => {
    const { body } = await team.lead.agent.post(`${base}/tokens`).send({ name: ' ', scopes: [], days: 0 }).expect(400);
    expect(body.problems.map(({ path }: { path: string }) => path)).toEqual(['body.name', 'body.scopes', 'body.days']);
    await team.lead.agent
      .post(`${base}/tokens`)
      .send({ name: 'x', scopes: ['everything'], days: 1 })
      .expect(400);
    await team.lead.agent
      .post(`${base}/tokens`)
      .send({ name: 'x', scopes: ['weather:read'], days: 367 })
      .expect(400);
  });
});
