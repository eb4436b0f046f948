import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { demoEpw } from '../../support/demo-epw.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;
let desk: TeamDesk;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  desk = deskOf(team, engineer);
  await road.startWorker();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const auditOf = async (fileId: string) => {
  const { rows } = await road.db.raw<{ rows: { act: string; personId: string; requestId: string | null }[] }>(
    `select audit_events.act, audit_events.person_id as "personId", audit_events.request_id as "requestId"
     from audit_events where audit_events.subject ->> 'fileId' = ? order by audit_events.id`,
    [fileId],
  );
  return rows;
};

describe('a weather file in its states', () => {
  it('leaves the count when it is withdrawn, and may come in again and find its station', async () => {
    const epw = demoEpw(0);
    const { file } = await desk.upload(epw.name, epw.text);
    await desk.readToTheEnd(file.id);
    const accepted = await desk.accept(file.id);
    const again = await desk.accept(file.id);
    expect([again.status, again.body.code, again.body.message]).toEqual([
      409,
      'wrong_state',
      'This file was already accepted.',
    ]);
    const map = await desk.mapWithoutPending();
    expect(map.stations.map(({ id }) => id)).toEqual([accepted.body.stationId]);
    const runId = (await desk.place(accepted.body.stationId)).shown?.runId ?? '';

    expect((await desk.withdraw(file.id, '  ')).status).toBe(400);
    const withdrawn = await desk.withdraw(file.id, 'The sensor stood in the sun.');
    expect(withdrawn.body).toMatchObject({ status: 'withdrawn', name: epw.name });
    expect((await desk.withdraw(file.id)).body).toMatchObject({
      code: 'wrong_state',
      message: expect.stringMatching(/already withdrawn/),
    });
    expect((await desk.accept(file.id)).body).toMatchObject({
      code: 'wrong_state',
      message: expect.stringMatching(/was withdrawn/),
    });
    expect(await desk.map()).toMatchObject({ stations: [], pending: 0 });
    await engineer.agent
      .get(`/api/teams/${team.teamId}/programmes/${team.programmeId}/stations/${accepted.body.stationId}`)
      .expect(404);
    expect(await desk.runHours(runId)).toHaveLength(8760);
    const record = await desk.record(file.id);
    expect(record.facts?.hours).toBe(8760);
    expect((await auditOf(file.id)).map(({ act }) => act)).toEqual([
      'weather file uploaded',
      'weather file accepted',
      'weather file withdrawn',
    ]);
    for (const event of await auditOf(file.id)) {
      expect(event).toMatchObject({ personId: engineer.personId, requestId: expect.any(String) });
    }

    const second = await desk.upload(epw.name, epw.text);
    expect(second.known).toBe(false);
    expect(second.file.id).not.toBe(file.id);
    await desk.readToTheEnd(second.file.id);
    expect((await desk.accept(second.file.id)).body.stationId).toBe(accepted.body.stationId);
    expect((await desk.mapWithoutPending()).stations).toHaveLength(1);
  });

  it('that asks cannot be accepted, and says what it asks', async () => {
    const epw = demoEpw(1);
    const elevation = epw.station.elevationM.toFixed(1);
    const tooLow = epw.text.replace(`,${elevation}\r\n`, `,${(epw.station.elevationM - 600).toFixed(1)}\r\n`);
    expect(tooLow).not.toBe(epw.text);
    const { file } = await desk.upload('asks.epw', tooLow);
    const record = await desk.readToTheEnd(file.id);
    expect(record.file.status).toBe('asks');
    expect(record.asks.map(({ what }) => what)).toEqual(['pressure-elevation']);
    expect(record.facts?.hours).toBe(8760);
    const refused = await desk.accept(file.id);
    expect(refused.status).toBe(409);
    expect(refused.body.code).toBe('wrong_state');
    expect(refused.body.message).toContain(record.asks[0]?.message);
    expect((await desk.withdraw(file.id)).body.status).toBe('withdrawn');
  });

  it('is listed newest first, page by page, each file once', async () => {
    const list = `/api/teams/${team.teamId}/weather-files`;
    const whole = await engineer.agent.get(list).expect(200);
    expect(whole.body).toMatchObject({ total: 3, page: 1, pages: 1 });
    const seen: string[] = [];
    for (const page of [1, 2, 3]) {
      const { body } = await engineer.agent.get(list).query({ limit: 1, page }).expect(200);
      expect(body).toMatchObject({ total: 3, page, pages: 3 });
      seen.push(...body.items.map(({ id }: { id: string }) => id));
    }
    expect(seen).toEqual(whole.body.items.map(({ id }: { id: string }) => id));
    expect((await engineer.agent.get(list).query({ limit: 1, page: 4 }).expect(200)).body.items).toEqual([]);
    for (const page of ['0', '-1', 'x', '1.5']) {
      const answer = await engineer.agent.get(list).query({ page }).expect(400);
      expect(answer.body.problems[0].path).toBe('query.page');
    }
  });
});

describe('another team', () => {
  it('sees nothing of the files, and its own upload of the same bytes is its own', async () => {
    const other = await road.makeTeam('Southern offices');
    const stranger = await other.join('engineer');
    const strangerDesk = deskOf(other, stranger);
    const ours = (await engineer.agent.get(`/api/teams/${team.teamId}/weather-files`)).body.items[0];
    const [station] = (await desk.mapWithoutPending()).stations;
    const runId = (await desk.place(station?.id ?? '')).shown?.runId ?? '';

    const paths = [
      `/api/teams/${team.teamId}/weather-files`,
      `/api/teams/${team.teamId}/weather-files/${ours.id}`,
      `/api/teams/${other.teamId}/weather-files/${ours.id}`,
      `/api/teams/${other.teamId}/weather-files/${ours.id}/original`,
      `/api/teams/${other.teamId}/runs/${runId}/hours`,
      `/api/teams/${other.teamId}/programmes/${team.programmeId}/map`,
      `/api/teams/${other.teamId}/programmes/${other.programmeId}/stations/${station?.id}`,
      `/api/teams/${team.teamId}/events`,
    ];
    for (const path of paths) expect((await stranger.agent.get(path)).status, path).toBe(404);
    for (const act of ['acceptance', 'withdrawal']) {
      const path = `/api/teams/${other.teamId}/weather-files/${ours.id}/${act}`;
      const body = act === 'withdrawal' ? { reason: 'mine now' } : undefined;
      expect((await stranger.agent.post(path).send(body)).status, path).toBe(404);
    }
    expect((await strangerDesk.map()).stations).toEqual([]);

    const epw = demoEpw(0);
    const theirs = await strangerDesk.upload(epw.name, epw.text);
    expect(theirs.known).toBe(false);
    await strangerDesk.readToTheEnd(theirs.file.id);
    const accepted = await strangerDesk.accept(theirs.file.id);
    expect(accepted.body.stationId).not.toBe(station?.id);
    expect((await strangerDesk.mapWithoutPending()).stations).toHaveLength(1);
    expect((await desk.map()).stations.map(({ id }) => id)).toEqual([station?.id]);
  });
});
