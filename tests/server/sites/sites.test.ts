import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { siteLetters } from '../../../server/features/sites/site-letters.ts';
import type { SiteRecord } from '../../../src/contract/site-record.ts';
import type { Site, SitePage } from '../../../src/contract/sites.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { insertStationsWithYears } from '../../support/stations-with-years.ts';

let road: Road;
let team: RoadTeam;
let planner: Member;
let sites: string;
let stationIds: readonly string[];

/** Near 45° N 10° E: on the plain, 40 km east of it, and on a mountain between the two. */
const stations = [
  { name: 'Plain', latitude: 45, longitude: 10, elevationM: 60 },
  { name: 'East', latitude: 45, longitude: 10.5, elevationM: 70 },
  { name: 'Mountain', latitude: 45.02, longitude: 10.3, elevationM: 2100 },
];

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  planner = await team.join('planner');
  sites = `/api/teams/${team.teamId}/programmes/${team.programmeId}/sites`;
  const { ownerDb } = road.database;
  stationIds = await insertStationsWithYears(ownerDb, { teamId: team.teamId, personId: planner.personId, stations });
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

async function make(facts: Partial<Site> & { name: string }): Promise<Site> {
  const { body } = await planner.agent
    .post(sites)
    .send({ latitude: 45, longitude: 10.2, ...facts })
    .expect(200);
  return body;
}
async function record({ id }: Site): Promise<SiteRecord> {
  return (await planner.agent.get(`${sites}/${id}`).expect(200)).body;
}
async function list(query: Record<string, string | number> = {}): Promise<SitePage> {
  return (await planner.agent.get(sites).query(query).expect(200)).body;
}

test('letters run a to z, then aa', () => {
  expect([1, 2, 26, 27, 52, 53, 702, 703].map(siteLetters)).toEqual(['a', 'b', 'z', 'aa', 'az', 'ba', 'zz', 'aaa']);
});

describe('a site', () => {
  test('gets the next letters, the height of the relief and the station that the method chooses', async () => {
    const site = await make({ name: 'School by the river' });
    expect(site).toMatchObject({ letters: 'a', elevationSource: 'relief', revision: 1, flags: [], toSettle: false });
    expect(site.station).toMatchObject({ id: stationIds[0], name: 'Plain', chosen: false, reason: null });
    // 0.2° of longitude at 45° N on a sphere of 6371.0088 km: 0.2 x 111.195 km x cos 45°, the arc a little shorter.
    expect(site.station?.distanceKm).toBeCloseTo(0.2 * 111.195 * Math.SQRT1_2, 2);
    const { candidates, reliefM } = await record(site);
    expect(site.elevationM).toBe(reliefM);
    expect(candidates.map(({ name }) => name)).toEqual(['Plain', 'East', 'Mountain']);
    // A height of the relief is C at best, 2 km of height are D; one typical year is C.
    expect(candidates.map(({ grade }) => grade)).toEqual(['C', 'C', 'D']);
  });

  test('keeps a height that a person gave, and flags one that the relief does not have', async () => {
    const site = await make({ name: 'Typed', elevationM: 1200 });
    expect(site).toMatchObject({
      letters: 'b',
      elevationSource: 'person',
      flags: ['height', 'relief'],
      toSettle: true,
    });
  });

  test('asks for a reason when another station than the first is chosen', async () => {
    const site = await make({ name: 'Chosen' });
    const change = (station: unknown, revision = 1) =>
      planner.agent.patch(`${sites}/${site.id}`).send({ revision, station });
    const refused = await change({ id: stationIds[1], reason: null }).expect(400);
    expect(refused.body.problems).toEqual([
      { path: 'body.station.reason', message: 'Plain stands first in the ranking. Say why East is chosen instead.' },
    ]);
    await change({ id: team.teamId, reason: 'x' }).expect(400);
    const { body: chosen } = await change({ id: stationIds[1], reason: 'Same valley.' }).expect(200);
    expect(chosen).toMatchObject({ revision: 2, station: { name: 'East', chosen: true, reason: 'Same valley.' } });
    expect((await change(null, 2).expect(200)).body.station).toMatchObject({ name: 'Plain', chosen: false });
    // The first one needs no reason, and is settled by being chosen.
    expect((await change({ id: stationIds[0], reason: null }, 3).expect(200)).body.station).toMatchObject({
      chosen: true,
    });
  });

  test('moves with the height of the relief, and keeps the height that was given', async () => {
    const site = await make({ name: 'Moving' });
    const move = (revision: number, latitude: number, longitude: number) =>
      planner.agent.put(`${sites}/${site.id}/position`).send({ revision, latitude, longitude });
    const { body: moved } = await move(1, 46.5, 10.3).expect(200);
    expect(moved.elevationM).toBeGreaterThan((site.elevationM ?? 0) + 300);
    expect(moved).toMatchObject({ latitude: 46.5, elevationSource: 'relief', revision: 2 });
    await planner.agent.patch(`${sites}/${site.id}`).send({ revision: 2, elevationM: 900 }).expect(200);
    const back = await move(3, 45, 10.2).expect(200);
    expect(back.body).toMatchObject({
      elevationM: 900,
      elevationSource: 'person',
      flags: expect.arrayContaining(['relief']),
    });
    // Open sea, half way between Africa and America.
    expect((await move(4, 0, -30).expect(200)).body.flags).toEqual(expect.arrayContaining(['sea', 'far']));
    expect((await move(5, 90.1, 10).expect(400)).body.problems[0]).toMatchObject({ path: 'body.latitude' });
  });

  test('tells the second of two who move it what the first one did, and loses nothing of either', async () => {
    const site = await make({ name: 'Contended' });
    const engineer = await team.join('engineer');
    const path = `${sites}/${site.id}/position`;
    const [one, other] = await Promise.all([
      planner.agent.put(path).send({ revision: 1, latitude: 45.1, longitude: 10.2 }),
      engineer.agent.put(path).send({ revision: 1, latitude: 45.2, longitude: 10.2 }),
    ]);
    expect([one.status, other.status].sort()).toEqual([200, 409]);
    const [won, lost] = one.status === 200 ? [one, other] : [other, one];
    expect(lost.body).toMatchObject({ code: 'conflict' });
    expect(lost.body.message).toMatch(/^Test (planner|engineer) \d changed position, .* of Contended meanwhile/);
    expect(lost.body.problems[0].message).toContain(`to “${won.body.latitude}, 10.2”`);
    expect((await record(site)).site).toMatchObject({ latitude: won.body.latitude, revision: 2 });
    // On top of what the first one did, the second one's move is stored, and both stand in the changes.
    const latitude = won.body.latitude === 45.1 ? 45.2 : 45.1;
    await engineer.agent.put(path).send({ revision: 2, latitude, longitude: 10.2 }).expect(200);
    const { changes } = await record(site);
    expect(changes.map(({ revision }) => revision)).toEqual([3, 2]);
  });

  test('keeps gates, water, duties and notes, and tells in its changes what was changed', async () => {
    const site = await make({ name: 'Full' });
    const path = `${sites}/${site.id}`;
    const gates = [{ gate: 'water available', answer: 'fail', note: '' }];
    await planner.agent.patch(path).send({ revision: 1, gates }).expect(400);
    const answered = [{ gate: 'water available', answer: 'fail', note: 'No main within 2 km' }];
    const water = { hardnessMgL: 220, silicaMgL: 30, peakDayLimitM3: 12 };
    await planner.agent.patch(path).send({ revision: 1, gates: answered, water, designLoadKw: 350 }).expect(200);
    const duty = { owner: 'Site engineer', dueOn: '2027-03-31', doneOn: null, note: '' };
    await planner.agent
      .put(`${path}/duties/${encodeURIComponent('water safety plan')}`)
      .send(duty)
      .expect(200);
    const kept = await record(site);
    expect(kept.site).toMatchObject({ gates: answered, designLoadKw: 350, revision: 2 });
    expect(kept.water).toMatchObject({ hardnessMgL: 220, alkalinityMgL: null, silicaMgL: 30, peakDayLimitM3: 12 });
    expect(kept.duties).toEqual([{ duty: 'water safety plan', ...duty }]);
    expect(kept.changes[0]?.fields.map(({ field }) => field)).toEqual(['design load', 'gates', 'water']);
    // The same again changes nothing and makes no revision.
    await planner.agent.patch(path).send({ revision: 2, designLoadKw: 350 }).expect(200);
    expect((await record(site)).site.revision).toBe(2);
  });

  test('is removed with a reason, and its letters are not given again', async () => {
    const site = await make({ name: 'Short-lived' });
    const removal = { siteIds: [site.id], reason: 'Sold.' };
    expect((await planner.agent.post(`${sites}/removal`).send(removal).expect(200)).body).toEqual({ removed: 1 });
    expect((await planner.agent.post(`${sites}/removal`).send(removal).expect(200)).body).toEqual({ removed: 0 });
    await planner.agent.get(`${sites}/${site.id}`).expect(404);
    await planner.agent.patch(`${sites}/${site.id}`).send({ revision: 1, name: 'Again' }).expect(404);
    const next = await make({ name: 'After' });
    expect(next.letters.charCodeAt(0)).toBe(site.letters.charCodeAt(0) + 1);
  });
});

describe('the list of sites', () => {
  test('is filtered, sorted and paged, and counts what waits for a person', async () => {
    const all = await list();
    expect(all.items.map(({ letters }) => letters)).toEqual([...all.items.map(({ letters }) => letters)].sort());
    expect(all.counts).toMatchObject({ all: all.total, filters: { 'to settle': 2, chosen: 1 } });
    expect((await list({ filter: 'to settle' })).items.map(({ name }) => name)).toEqual(['Typed', 'Moving']);
    expect((await list({ text: 'school BY' })).items.map(({ letters }) => letters)).toEqual(['a']);
    const far = await list({ sort: 'distance', order: 'desc', limit: 1 });
    expect(far.items.map(({ name }) => name)).toEqual(['Moving']);
    expect(far.pages).toBe(all.total);
    expect((await list({ sort: 'load' })).items[0]?.name).toBe('Full');
  });
});
