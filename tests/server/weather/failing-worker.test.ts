import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { OriginalStore } from '../../../server/storage/original-store.ts';
import { demoEpw } from '../../support/demo-epw.ts';
import { eventually } from '../../support/eventually.ts';
import { jobsDueNow } from '../../support/jobs-due-now.ts';
import { openRoad, type Road } from '../../support/open-road.ts';
import { deskOf, type TeamDesk } from '../../support/team-desk.ts';

let road: Road;
let desk: TeamDesk;
let worker: { close(): Promise<void> } | null = null;

beforeAll(async () => {
  road = await openRoad();
  const team = await road.makeTeam('Northern offices');
  desk = deskOf(team, await team.join('engineer'));
});
afterEach(async () => {
  await worker?.close();
  worker = null;
});
afterAll(() => road.close());

/** The road's store, whose first reads fail. */
function failingStore(failures: number): { storage: OriginalStore; reads: () => number } {
  let reads = 0;
  const storage: OriginalStore = {
    ...road.storage,
    async read(key) {
      reads += 1;
      if (reads <= failures) throw new Error('the disk could not be read');
      return await road.storage.read(key);
    },
  };
  return { storage, reads: () => reads };
}

/** Skips the waits between tries until `done`. */
async function hurry(what: string, done: () => Promise<boolean>): Promise<void> {
  await eventually(what, async () => {
    await jobsDueNow(road.database);
    return await done();
  });
}

const rowsOf = async (table: 'findings' | 'weather_years', fileId: string): Promise<number> => {
  const { rows } = await road.db.raw<{ rows: [{ number: number }] }>(
    `select count(*)::integer as number from ${table} where weather_file_id = ?`,
    [fileId],
  );
  return rows[0].number;
};

describe('a worker that fails on the way', () => {
  it('tries the file again and stores it once', async () => {
    const { storage, reads } = failingStore(1);
    worker = await road.startWorker({ storage });
    const { file } = await desk.upload('first.epw', demoEpw(0).text);
    await eventually('the failed try', async () => reads() === 1);
    expect((await desk.record(file.id)).file).toMatchObject({ status: 'reading', failure: null });
    expect(await rowsOf('findings', file.id)).toBe(0);
    expect(await rowsOf('weather_years', file.id)).toBe(0);
    await hurry('the second try', async () => (await desk.record(file.id)).file.status !== 'reading');
    const record = await desk.record(file.id);
    expect(record.file).toMatchObject({ status: 'review', failure: null });
    expect(await rowsOf('findings', file.id)).toBe(record.findings.length);
    expect(await rowsOf('weather_years', file.id)).toBe(1);
    expect(road.log.errors.map(({ message }) => message).join('\n')).toContain('the disk could not be read');
  });

  it('says on the file that it was given up; uploading it again reads it after all', async () => {
    const { storage } = failingStore(Number.POSITIVE_INFINITY);
    worker = await road.startWorker({ storage });
    const { file } = await desk.upload('second.epw', demoEpw(1).text);
    await hurry('the last try', async () => (await desk.record(file.id)).file.failure !== null);
    const given = (await desk.record(file.id)).file;
    expect(given).toMatchObject({ status: 'reading', step: null, failure: expect.stringContaining('fault of ours') });
    expect((await desk.accept(file.id)).body).toMatchObject({ code: 'wrong_state' });
    await worker.close();

    worker = await road.startWorker();
    const again = await desk.upload('second.epw', demoEpw(1).text);
    expect(again).toMatchObject({ known: true, file: { id: file.id, failure: null } });
    expect((await desk.readToTheEnd(file.id)).file).toMatchObject({ status: 'review', failure: null });
  });

  it('leaves its work to another worker when it was killed half-way', async () => {
    const { file } = await desk.upload('third.epw', demoEpw(2).text);
    await road.database.ownerDb.raw(
      `update graphile_worker._private_jobs
       set locked_by = 'killed', locked_at = now() - interval '5 minutes', attempts = 1 where key = ?`,
      [file.id],
    );
    await road.db.raw(`update weather_files set step = 'storing' where id = ?`, [file.id]);
    worker = await road.startWorker();
    expect((await desk.readToTheEnd(file.id)).file).toMatchObject({ status: 'review', failure: null });
  });

  it('says so too when it was killed in its last try', async () => {
    const { file } = await desk.upload('fourth.epw', demoEpw(3).text);
    await road.database.ownerDb.raw('update graphile_worker._private_jobs set attempts = max_attempts where key = ?', [
      file.id,
    ]);
    worker = await road.startWorker();
    expect((await desk.readToTheEnd(file.id)).file.failure).toContain('fault of ours');
    expect((await desk.withdraw(file.id)).status).toBe(200);
  });

  it('refuses an original whose bytes are not those that came in', async () => {
    const { file } = await desk.upload('fifth.epw', demoEpw(4).text);
    const storage: OriginalStore = { ...road.storage, read: async () => Buffer.from(demoEpw(5).text) };
    worker = await road.startWorker({ storage });
    await hurry('the last try', async () => (await desk.record(file.id)).file.failure !== null);
    expect(await rowsOf('weather_years', file.id)).toBe(0);
  });
});
