import { createHash } from 'node:crypto';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { openTeamFeed } from '../../../server/jobs/team-feed.ts';
import type { TeamEvent } from '../../../src/contract/team-events.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let desk: TeamDesk;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  desk = deskOf(team, await team.join('engineer'));
  await road.startWorker();
});
afterEach(() => {
  expect(road.log.errors).toEqual([]);
});
afterAll(() => road.close());

const epw = demoEpw(0);

describe('the main road', () => {
  it('begins with an empty map, which is no error', async () => {
    expect(await desk.map()).toMatchObject({
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
    const { file, known } = await desk.upload(epw.name, bytes);
    expect(known).toBe(false);
    expect(file).toMatchObject({
      name: epw.name,
      bytes: bytes.length,
      fingerprint: createHash('sha256').update(bytes).digest('hex'),
      status: 'reading',
      stationId: null,
    });

    const record = await desk.readToTheEnd(file.id);
    expect(record.file).toMatchObject({ status: 'review', step: null, failure: null, format: 'EPW', kind: 'typical' });
    expect(record.file.station).toMatchObject({
      name: expect.stringContaining(epw.station.name),
      elevationM: epw.station.elevationM,
    });
    expect(record.file.completePct).toBeGreaterThan(99);
    expect(record.facts?.hours).toBe(8760);
    const { measured = 0, estimated = 0, repaired = 0, missing = 0 } = record.facts ?? {};
    expect(measured + estimated + repaired + missing).toBe(8760);
    expect((await desk.map()).stations).toEqual([]);

    const accepted = await desk.accept(file.id);
    expect(accepted.status).toBe(200);
    expect(accepted.body).toMatchObject({ status: 'accepted', stationId: expect.any(String) });
    const map = await desk.mapWithoutPending();
    expect(map.stations).toHaveLength(1);
    const [station] = map.stations;
    expect(station).toMatchObject({ id: accepted.body.stationId, scoreNote: null, verdict: expect.any(String) });
    expect(station?.score).toBeGreaterThanOrEqual(0);
    expect(station?.score).toBeLessThanOrEqual(100);

    await eventually('the event of the run', async () => told.some(({ kind }) => kind === 'run'));
    watching.abort();
    await ended;
    await feed.close();
    const words = told.map((event) => (event.kind === 'weather-file' ? (event.step ?? event.status) : event.kind));
    expect(words).toEqual(['received', 'reading', 'reducing', 'storing', 'review', 'accepted', 'run']);
  });

  it('shows the station as a place with ledger, arithmetic, grade and cautions', async () => {
    const [station] = (await desk.mapWithoutPending()).stations;
    const body = await desk.place(station?.id ?? '');
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
    expect(await desk.runHours(shown?.runId ?? '')).toHaveLength(8760);
  });

  it('knows the same bytes again, whatever their name, and stores nothing', async () => {
    const before = await road.countRows();
    const again = await desk.upload('another name.epw', Buffer.from(epw.text));
    expect(again.known).toBe(true);
    expect(again.file).toMatchObject({ name: epw.name, status: 'accepted' });
    expect(await road.countRows()).toEqual(before);
  });

  it('stores two uploads of the same bytes at once as one file', async () => {
    const twin = demoEpw(1);
    const before = await road.countRows();
    const [one, other] = await Promise.all([
      desk.upload(twin.name, Buffer.from(twin.text)),
      desk.upload(twin.name, Buffer.from(twin.text)),
    ]);
    expect(one.file.id).toBe(other.file.id);
    expect([one.known, other.known].toSorted()).toEqual([false, true]);
    await desk.readToTheEnd(one.file.id);
    const after = await road.countRows();
    expect(after['public.weather_files']).toBe((before['public.weather_files'] ?? 0) + 1);
    expect(after['public.weather_years']).toBe((before['public.weather_years'] ?? 0) + 1);
  });
});
