import { createHash } from 'node:crypto';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { demoWeatherFile } from '../../../data/demo/demo-weather-file.ts';
import { demoStations } from '../../../data/demo/stations.ts';
import { openTeamFeed } from '../../../server/jobs/team-feed.ts';
import type { Place, ProgrammeMap } from '../../../src/contract/runs.ts';
import type { TeamEvent, WeatherFile, WeatherFileRecord } from '../../../src/contract/weather.ts';
import { eventually } from '../../support/eventually.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
  await road.startWorker();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const [first, second] = demoStations.filter(({ year, faults }) => year === null && faults.length === 0);
if (first === undefined || second === undefined) throw new Error('the demo has two clean typical years');
const epw = demoWeatherFile(first);

async function uploaded(
  name: string,
  bytes: Buffer,
  by: Member = engineer,
): Promise<{ file: WeatherFile; known: boolean }> {
  const { body } = await by.agent
    .post(`/api/teams/${team.teamId}/weather-files`)
    .attach('file', bytes, name)
    .expect(200);
  return body;
}

async function recordOf(fileId: string): Promise<WeatherFileRecord> {
  const { body } = await engineer.agent.get(`/api/teams/${team.teamId}/weather-files/${fileId}`).expect(200);
  return body;
}

const readToTheEnd = (fileId: string): Promise<WeatherFileRecord> =>
  eventually('the end of reading', async () => {
    const record = await recordOf(fileId);
    return record.file.status !== 'reading' && record;
  });

const accept = (fileId: string) =>
  engineer.agent.post(`/api/teams/${team.teamId}/weather-files/${fileId}/acceptance`).send();

async function mapNow(): Promise<ProgrammeMap> {
  const { body } = await engineer.agent.get(`/api/teams/${team.teamId}/programmes/${team.programmeId}/map`).expect(200);
  return body;
}

const mapWithoutPending = (): Promise<ProgrammeMap> =>
  eventually('every run', async () => {
    const map = await mapNow();
    return map.pending === 0 && map;
  });

describe('the main road', () => {
  it('begins with an empty map, which is no error', async () => {
    expect(await mapNow()).toMatchObject({
      stations: [],
      pending: 0,
      invented: true,
      brief: { version: 1, preset: 'office' },
    });
  });

  it('leads from an upload over review and acceptance to a score on the map, and tells each step in order', async () => {
    const feed = await openTeamFeed({ databaseUrl: road.database.databaseUrl, log: road.log });
    const watching = new AbortController();
    const told: TeamEvent[] = [];
    const stream = feed.watch(team.teamId, watching.signal);
    const ended = (async () => {
      for await (const event of stream) told.push(event);
    })();

    const bytes = Buffer.from(epw.text);
    const { file, known } = await uploaded(epw.name, bytes);
    expect(known).toBe(false);
    expect(file).toMatchObject({
      name: epw.name,
      bytes: bytes.length,
      fingerprint: createHash('sha256').update(bytes).digest('hex'),
      status: 'reading',
      stationId: null,
    });

    const record = await readToTheEnd(file.id);
    expect(record.file).toMatchObject({ status: 'review', step: null, failure: null, format: 'EPW', kind: 'typical' });
    expect(record.file.station).toMatchObject({
      name: expect.stringContaining(first.name),
      elevationM: first.elevationM,
    });
    expect(record.file.completePct).toBeGreaterThan(99);
    expect(record.facts?.hours).toBe(8760);
    const { measured = 0, estimated = 0, repaired = 0, missing = 0 } = record.facts ?? {};
    expect(measured + estimated + repaired + missing).toBe(8760);
    expect((await mapNow()).stations).toEqual([]);

    const accepted = await accept(file.id).expect(200);
    expect(accepted.body).toMatchObject({ status: 'accepted', stationId: expect.any(String) });
    const map = await mapWithoutPending();
    expect(map.stations).toHaveLength(1);
    const [station] = map.stations;
    expect(station).toMatchObject({ id: accepted.body.stationId, scoreNote: null, verdict: expect.any(String) });
    expect(station?.score).toBeGreaterThanOrEqual(0);
    expect(station?.score).toBeLessThanOrEqual(100);

    await eventually('the event of the run', async () => told.some(({ kind }) => kind === 'run'));
    watching.abort();
    await ended;
    await feed.close();
    const words = told.map((event) => (event.kind === 'run' ? 'run' : (event.step ?? event.status)));
    expect(words).toEqual(['received', 'reading', 'reducing', 'storing', 'review', 'accepted', 'run']);
  });

  it('shows the station as a place with ledger, arithmetic, grade and cautions', async () => {
    const [station] = (await mapWithoutPending()).stations;
    const path = `/api/teams/${team.teamId}/programmes/${team.programmeId}/stations/${station?.id}`;
    const { body }: { body: Place } = await engineer.agent.get(path).expect(200);
    expect(body.years).toHaveLength(1);
    const { shown } = body;
    const total = Object.values(shown?.ledger.classes ?? {}).reduce((sum, hours) => sum + hours, 0);
    expect(total).toBe(8760);
    expect(shown?.score).toBe(station?.score);
    const points = (shown?.parts ?? []).reduce((sum, part) => sum + (part.points ?? 0), 0);
    expect(points).toBeCloseTo(shown?.scoreExact ?? Number.NaN, 9);
    expect(shown?.cautions).toContain('Typical years hide extremes: do not size plant from them.');
    if (shown?.worstSpell !== null) expect(shown?.worstSpell.start).toMatch(/^\d{1,2} [A-Z][a-z]{2} \d\d:00$/);
    expect(body.gradeColumns.map(({ column }) => column)).toEqual([
      'distance',
      'height difference',
      'years',
      'measured share',
      'kind',
    ]);
    const hours = await engineer.agent
      .get(`/api/teams/${team.teamId}/runs/${shown?.runId}/hours`)
      .buffer()
      .parse((response, done) => {
        const chunks: Buffer[] = [];
        response.on('data', (chunk: Buffer) => chunks.push(chunk));
        response.on('end', () => done(null, Buffer.concat(chunks)));
      })
      .expect(200);
    expect(hours.body).toHaveLength(8760);
  });

  it('knows the same bytes again, whatever their name, and stores nothing', async () => {
    const before = await road.countRows();
    const again = await uploaded('another name.epw', Buffer.from(epw.text));
    expect(again.known).toBe(true);
    expect(again.file).toMatchObject({ name: epw.name, status: 'accepted' });
    expect(await road.countRows()).toEqual(before);
  });

  it('stores two uploads of the same bytes at once as one file', async () => {
    const twin = demoWeatherFile(second);
    const before = await road.countRows();
    const [one, other] = await Promise.all([
      uploaded(twin.name, Buffer.from(twin.text)),
      uploaded(twin.name, Buffer.from(twin.text)),
    ]);
    expect(one.file.id).toBe(other.file.id);
    expect([one.known, other.known].toSorted()).toEqual([false, true]);
    await readToTheEnd(one.file.id);
    const after = await road.countRows();
    expect(after['public.weather_files']).toBe((before['public.weather_files'] ?? 0) + 1);
    expect(after['public.weather_years']).toBe((before['public.weather_years'] ?? 0) + 1);
  });
});
