import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;
let desk: TeamDesk;
let stations: string;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  desk = deskOf(team, engineer);
  stations = `/api/teams/${team.teamId}/stations`;
  await road.startWorker();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

async function accepted(name: string, text: string): Promise<string> {
  const { file } = await desk.upload(name, text);
  await desk.readToTheEnd(file.id);
  return (await desk.accept(file.id)).body.stationId;
}

const [first, second] = [demoEpw(0), demoEpw(1)];

describe('a station', () => {
  let stationId: string;

  it('is listed with its years and shows them side by side', async () => {
    stationId = await accepted(first.name, first.text);
    expect(await accepted('copy.epw', first.text.replace('COMMENTS 1,', 'COMMENTS 1,A copy. '))).toBe(stationId);
    const list = await engineer.agent.get(stations).expect(200);
    expect(list.body).toMatchObject({ total: 1, items: [{ id: stationId, years: 2, files: 2 }] });
    const { body } = await engineer.agent.get(`${stations}/${stationId}`).expect(200);
    expect(body.files.map(({ file }: { file: { name: string } }) => file.name)).toEqual(['copy.epw', first.name]);
    expect(body.files[0].facts.hours).toBe(8760);
    expect((await engineer.agent.get(stations).query({ text: 'no such' }).expect(200)).body.total).toBe(0);
  });

  it('is moved with a reason, and its years are judged anew at the new place', async () => {
    await desk.mapWithoutPending();
    const before = (await desk.place(stationId)).shown?.runId;
    const { body: was } = await engineer.agent.get(`${stations}/${stationId}`).expect(200);
    const { name, latitude, longitude, zone } = was.station;
    const place = { name: `${name} mast`, latitude, longitude, elevationM: was.station.elevationM + 120, zone };
    const moved = await engineer.agent
      .put(`${stations}/${stationId}/place`)
      .send({ ...place, reason: 'Surveyed.' })
      .expect(200);
    expect(moved.body).toMatchObject({
      name: `${name} mast`,
      elevationM: place.elevationM,
      utcOffsetH: was.station.utcOffsetH,
    });
    await eventually('the run at the new place', async () => (await desk.place(stationId)).shown?.runId !== before);
    const { rows } = await road.db.raw<{ rows: { reason: string }[] }>(
      `select subject ->> 'reason' as reason from audit_events where act = 'station moved'`,
    );
    expect(rows).toEqual([{ reason: 'Surveyed.' }]);
  });

  it('is not moved out of the world or into a zone that nobody knows', async () => {
    const place = { name: ' ', latitude: 91, longitude: 181, elevationM: 9001, zone: 'Mars/Olympus', reason: '' };
    const { body } = await engineer.agent.put(`${stations}/${stationId}/place`).send(place).expect(400);
    expect(body.problems.map(({ path }: { path: string }) => path)).toEqual([
      'body.name',
      'body.latitude',
      'body.longitude',
      'body.elevationM',
      'body.reason',
    ]);
    const zone = { name: 'X', latitude: 1, longitude: 1, elevationM: 1, zone: 'Mars/Olympus', reason: 'A test.' };
    const wrong = await engineer.agent.put(`${stations}/${stationId}/place`).send(zone).expect(400);
    expect(wrong.body.problems[0]).toMatchObject({
      path: 'body.zone',
      message: expect.stringContaining('Europe/Rome'),
    });
  });

  it('takes another in, with its files and years, and that one is there no longer', async () => {
    const other = await accepted(second.name, second.text);
    expect(other).not.toBe(stationId);
    const merge = (otherStationId: string) =>
      engineer.agent.post(`${stations}/${stationId}/merge`).send({ otherStationId, reason: 'The same mast.' });
    expect((await merge(other).expect(200)).body).toMatchObject({ id: stationId, years: 3, files: 3 });
    await engineer.agent.get(`${stations}/${other}`).expect(404);
    await merge(other).expect(404);
    await merge(stationId).expect(409);
    const map = await desk.mapWithoutPending();
    expect(map.stations.map(({ id }) => id)).toEqual([stationId]);
  });

  it('has rules switched off with a reason, which a file that is read from then on goes by', async () => {
    const rule = `${stations}/${stationId}/rules/step`;
    const off = await engineer.agent.put(rule).send({ reason: 'Outflows are common here.' }).expect(200);
    expect(off.body.rulesOff).toMatchObject([{ rule: 'step', reason: 'Outflows are common here.' }]);
    await engineer.agent.put(`${stations}/${stationId}/rules/everything`).send({ reason: 'x' }).expect(400);
    await engineer.agent.put(rule).send({ reason: ' ' }).expect(400);
    expect((await engineer.agent.delete(rule).expect(200)).body.rulesOff).toEqual([]);
    await engineer.agent.delete(rule).expect(200);
  });

  it('is the engineers’ to change', async () => {
    const planner = await team.join('planner');
    await planner.agent.get(`${stations}/${stationId}`).expect(200);
    await planner.agent.delete(`${stations}/${stationId}/rules/step`).expect(403);
  });
});
