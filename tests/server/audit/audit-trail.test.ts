import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { hashOfEvent } from '../../../server/features/audit/canonical-event.ts';
import { csvRecords } from '../../support/csv-rows.ts';
import { type Agent, openWeb, type WebForTests } from '../../support/open-web.ts';

interface Event {
  position: number;
  at: string;
  act: string;
  person: { id: string; name: string } | null;
  subject: { name?: string };
  hash: string;
}

let web: WebForTests;
let lead: Agent;
let planner: Agent;
let plannerId: string;
let teamId: string;
let team: string;
let programme: string;
const FORMULA = '=HYPERLINK("https://example.org")';

beforeAll(async () => {
  web = await openWeb();
  const made = await web.makeTeam(await web.makePerson('lead@example.org'));
  teamId = made.teamId;
  team = `/api/teams/${teamId}`;
  programme = `${team}/programmes/${made.programmeId}`;
  plannerId = await web.makePerson('planner@example.org');
  await web.addMember({ teamId, personId: plannerId, role: 'planner' });
  lead = await web.signIn('lead@example.org');
  planner = await web.signIn('planner@example.org');
  for (const name of ['North hall', FORMULA, 'South hall, 100%_"quoted"'])
    await planner.post(`${programme}/sites`).send({ name, latitude: -24, longitude: 25 }).expect(200);
  await lead.post(`${team}/programmes`).send({ name: 'Clinics' }).expect(200);
  await lead.patch(team).send({ name: 'Renamed' }).expect(204);
});
afterEach(() => {
  expect(web.log.errors).toEqual([]);
});
afterAll(() => web.close());

const list = async (query: Record<string, string | number> = {}): Promise<{ items: Event[]; next: number | null }> =>
  (await lead.get(`${team}/audit-events`).query(query).expect(200)).body;
const actsOf = async (query: Record<string, string | number>) => (await list(query)).items.map(({ act }) => act);

describe('the audit trail of a team', () => {
  it('says who did what, newest first, and where its chain stands', async () => {
    const { body } = await lead.get(`${team}/audit-events`).expect(200);
    expect(body.items.map(({ act }: Event) => act)).toEqual([
      'team renamed',
      'programme made',
      'site made',
      'site made',
      'site made',
    ]);
    expect(body.items[2]).toMatchObject({
      position: 3,
      person: { id: plannerId, name: 'Person of planner@example.org' },
      subject: { name: 'South hall, 100%_"quoted"' },
    });
    expect(body.chain).toEqual({ events: 5, hash: body.items[0].hash });
    expect(body.people.map(({ name }: { name: string }) => name)).toEqual([
      'Person of lead@example.org',
      'Person of planner@example.org',
    ]);
  });

  it('is narrowed by time, person, kind and object, alone and together', async () => {
    expect(await actsOf({ personId: plannerId })).toHaveLength(3);
    expect(await actsOf({ kind: 'programmes' })).toEqual(['programme made']);
    expect(await actsOf({ kind: 'sites', object: 'north HALL' })).toEqual(['site made']);
    // What stands in a pattern elsewhere stands for itself here.
    expect(await actsOf({ object: '%_"quoted"' })).toEqual(['site made']);
    expect(await actsOf({ object: '%' })).toHaveLength(1);
    const { items } = await list({ kind: 'team' });
    const today = items[0]?.at.slice(0, 10) ?? '';
    expect(await actsOf({ from: today, until: today })).toHaveLength(5);
    expect(await actsOf({ until: '2020-01-01' })).toEqual([]);
    expect(await actsOf({ from: today, kind: 'tokens' })).toEqual([]);
    const { body } = await lead.get(`${team}/audit-events?kind=accounts&from=yesterday&limit=201`).expect(400);
    expect(body.problems).toHaveLength(3);
  });

  it('comes a page at a time, without a gap or a repetition while more is written', async () => {
    const first = await list({ limit: 2 });
    await planner.post(`${programme}/sites`).send({ name: 'Late', latitude: -24, longitude: 25 }).expect(200);
    const second = await list({ limit: 2, before: first.next ?? 0 });
    const third = await list({ limit: 2, before: second.next ?? 0 });
    const places = [first, second, third].flatMap(({ items }) => items.map(({ position }) => position));
    expect(places).toEqual([5, 4, 3, 2, 1]);
    expect(third.next).toBeNull();
  });

  it('is taken along as CSV in which nothing acts as a formula, which is itself written down', async () => {
    const answer = await lead.get(`${team}/audit-events.csv?kind=sites`).buffer().expect(200);
    expect(answer.headers).toMatchObject({
      'content-type': 'text/csv; charset=utf-8',
      'content-disposition': 'attachment; filename=audit-trail.csv',
      'cache-control': 'no-store',
      'x-content-type-options': 'nosniff',
    });
    const rows = csvRecords(answer.text.replace('\uFEFF', '').replaceAll('\r\n', '\n'));
    expect(rows.map(({ Act }) => Act)).toEqual(Array.from({ length: 4 }, () => 'site made'));
    for (const cell of rows.flatMap((row) => Object.values(row))) expect(cell).not.toMatch(/^\s*[=+\-@]/);
    expect(JSON.parse(rows[1]?.About ?? '').name).toBe(FORMULA);
    const [taken] = (await list({ kind: 'downloads' })).items;
    expect(taken).toMatchObject({ act: 'audit trail downloaded', subject: { format: 'csv', kind: 'sites' } });
  });

  it('is taken along as JSON from which anybody can hash every event again', async () => {
    const { body } = await lead.get(`${team}/audit-events.json`).buffer().expect(200);
    expect(body.at(-1).act).toBe('audit trail downloaded');
    let previousHash = '0'.repeat(64);
    for (const [index, event] of body.entries()) {
      const { rows } = await web.database.db.raw<{ rows: { subjectText: string }[] }>(
        'select cast(cast(? as jsonb) as text) as "subjectText"',
        [JSON.stringify(event.subject)],
      );
      const subjectText = rows[0]?.subjectText ?? '';
      const hashed = { ...event, teamId, subjectText, position: index + 1, previousHash };
      expect(hashOfEvent(hashed)).toBe(event.hash);
      previousHash = event.hash;
    }
    expect((await lead.get(`${team}/audit-events.json?until=2020-01-01`).buffer().expect(200)).body).toEqual([]);
  });
});
