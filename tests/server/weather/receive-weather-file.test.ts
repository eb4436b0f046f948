import { createHash, randomUUID } from 'node:crypto';
import { writeFile } from 'node:fs/promises';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { noteJudgingFailure } from '../../../server/features/weather/note-failure.ts';
import { type Receiving, receiveWeatherFile } from '../../../server/features/weather/receive-weather-file.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { type Member, openRoad, type Road, type RoadTeam } from '../../support/open-road.ts';
import { deskOf } from '../../support/team-desk.ts';

let road: Road;
let team: RoadTeam;
let engineer: Member;

beforeAll(async () => {
  road = await openRoad();
  team = await road.makeTeam('Northern offices');
  engineer = await team.join('engineer');
});
afterAll(() => road.close());

async function receiving(content: string, personId = engineer.personId): Promise<Receiving> {
  const temporaryPath = path.join(road.originalsDir, '..', 'waiting');
  await writeFile(temporaryPath, content);
  const fingerprint = createHash('sha256').update(content).digest('hex');
  const upload = { name: 'x.epw', bytes: content.length, fingerprint, temporaryPath };
  return { teamId: team.teamId, personId, tokenId: null, batchId: null, requestId: null, at: new Date(), upload };
}

describe('receiving a weather file', () => {
  it('stores no row of any kind when one of them cannot be stored, and takes the same bytes afterwards', async () => {
    const before = await road.countRows();
    const nobody = await receiving('weather', randomUUID());
    await expect(receiveWeatherFile(road, nobody)).rejects.toThrow('foreign key');
    expect(await road.countRows()).toEqual(before);
    const received = await receiveWeatherFile(road, await receiving('weather'));
    expect(received.known).toBe(false);
  });

  it('stores no row when the original cannot be kept', async () => {
    const before = await road.countRows();
    const storage = { ...road.storage, put: async () => Promise.reject(new Error('the disk is full')) };
    await expect(receiveWeatherFile({ db: road.db, storage }, await receiving('other'))).rejects.toThrow(
      'disk is full',
    );
    expect(await road.countRows()).toEqual(before);
  });

  it('queues exactly one job with the row, in the same transaction', async () => {
    const before = await road.countRows();
    await Promise.all(Array.from({ length: 5 }, async () => receiveWeatherFile(road, await receiving('five at once'))));
    const after = await road.countRows();
    for (const table of ['public.weather_files', 'graphile_worker._private_jobs', 'public.audit_events']) {
      expect(after[table], table).toBe((before[table] ?? 0) + 1);
    }
  });
});

describe('an accepted year whose judging was given up', () => {
  it('says so on its file and on the map, and is no longer pending', async () => {
    const desk = deskOf(team, engineer);
    const epw = demoEpw(0);
    const worker = await road.startWorker();
    const { file } = await desk.upload(epw.name, epw.text);
    await desk.readToTheEnd(file.id);
    await worker.close();
    await desk.accept(file.id);
    expect(await desk.map()).toMatchObject({ pending: 1, stations: [{ score: null, scoreNote: 'not judged yet' }] });

    const { rows } = await road.db.raw<{ rows: [{ id: string }] }>(
      'select id from weather_years where weather_file_id = ?',
      [file.id],
    );
    await noteJudgingFailure(road.db, { teamId: team.teamId, weatherYearId: rows[0].id }, 'tries');
    expect((await desk.record(file.id)).file.failure).toContain('fault of ours');
    const map = await desk.map();
    expect(map).toMatchObject({
      pending: 0,
      stations: [{ score: null, scoreNote: expect.stringContaining('not judged: a fault of ours') }],
    });

    await road.startWorker();
    const judged = await eventually('the run', async () => {
      const [station] = (await desk.map()).stations;
      return station?.score === null ? null : station;
    });
    expect(judged.scoreNote).toBeNull();
    await eventually('a file without failure', async () => (await desk.record(file.id)).file.failure === null);
  });
});
