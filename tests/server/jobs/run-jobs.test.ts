import { randomUUID } from 'node:crypto';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { connect } from '../../../server/db/connection.ts';
import { inTransaction } from '../../../server/db/in-transaction.ts';
import { addJob, type JobPayloads, MAX_ATTEMPTS } from '../../../server/jobs/queue.ts';
import { type JobTasks, runJobs, type WhyDead } from '../../../server/jobs/run-jobs.ts';
import { MOST_DEATHS_ALONE } from '../../../server/jobs/worker-deaths.ts';
import { beat, releaseSilentPools } from '../../../server/jobs/worker-pool-store.ts';
import { eventually } from '../../support/eventually.ts';
import { jobsDueNow } from '../../support/jobs-due-now.ts';
import { type KeptLog, keepLog } from '../../support/quiet-log.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

type Reading = JobPayloads['read-weather-file'];

let database: TestDatabase;
let log: KeptLog;
let worker: { close(): Promise<void> } | null = null;

beforeAll(async () => {
  database = await makeTestDatabase();
});
beforeEach(() => {
  log = keepLog();
});
afterEach(async () => {
  await worker?.close();
  worker = null;
  await database.db.raw('select graphile_worker.complete_jobs(array(select jobs.id from graphile_worker.jobs))');
});
afterAll(async () => {
  await database.drop();
});

async function startWith(reading: {
  run: (payload: Reading, progressed: () => Promise<void>) => Promise<void>;
  dead?: (payload: Reading, why: WhyDead) => Promise<void>;
}) {
  const nothing = async (): Promise<void> => undefined;
  const tasks: JobTasks = {
    'read-weather-file': { dead: nothing, ...reading },
    'open-weather-archive': { run: nothing, dead: nothing },
    'judge-year': { run: nothing, dead: nothing },
    'queue-site-runs': { run: nothing, dead: nothing },
    'send-mail': { run: nothing, dead: nothing },
    'export-team': { run: nothing, dead: nothing },
    'end-team': { run: nothing, dead: nothing },
  };
  const { databaseUrl } = database;
  // Connections as the product's own worker has them, which may be cut without a word.
  const db = connect({ databaseUrl, maxConnections: 4 });
  const jobs = await runJobs({ db, databaseUrl, tasks, log });
  worker = {
    async close() {
      await jobs.close();
      await db.destroy();
    },
  };
}

const newReading = (): Reading => ({ teamId: randomUUID(), fileId: randomUUID() });

const addReading = (payload: Reading) =>
  inTransaction(database.db, (transaction) =>
    addJob(transaction, { task: 'read-weather-file', payload, jobKey: payload.fileId }),
  );

/** A job of our key as the queue has it. */
async function jobOf(payload: Reading) {
  const { rows } = await database.db.raw<{ rows: { attempts: number; lockedBy: string | null }[] }>(
    `select jobs.attempts, jobs.locked_by as "lockedBy" from graphile_worker.jobs where jobs.key = ?`,
    [payload.fileId],
  );
  return rows[0] ?? null;
}

describe('the job worker', () => {
  it('does a job once its transaction has committed, and not when it was taken back', async () => {
    const done: Reading[] = [];
    await startWith({ run: async (payload) => void done.push(payload) });
    const [kept, takenBack] = [newReading(), newReading()];
    const lost = inTransaction(database.db, async (transaction) => {
      await addJob(transaction, { task: 'read-weather-file', payload: takenBack, jobKey: takenBack.fileId });
      throw new Error('taken back');
    });
    await expect(lost).rejects.toThrow('taken back');
    await addReading(kept);
    await eventually('the job', async () => done.length > 0);
    expect(done).toEqual([kept]);
    expect(await eventually('an empty queue', async () => (await jobOf(kept)) === null)).toBe(true);
    expect(log.errors).toEqual([]);
  });

  it('tries a job again that failed', async () => {
    let tries = 0;
    await startWith({
      run: async () => {
        tries += 1;
        if (tries === 1) throw new Error('the disk is full');
      },
    });
    const payload = newReading();
    await addReading(payload);
    await eventually('the failed try', async () => tries === 1 && (await jobOf(payload))?.lockedBy === null);
    await jobsDueNow(database);
    await eventually('the second try', async () => tries === 2 && (await jobOf(payload)) === null);
    expect(log.errors.map(({ message }) => message).join()).toContain('the disk is full');
  });

  it('gives a job up after its last try, says so once, and begins anew when it is added again', async () => {
    let tries = 0;
    const buried: Reading[] = [];
    await startWith({
      run: async () => {
        tries += 1;
        if (tries <= MAX_ATTEMPTS) throw new Error('always');
      },
      dead: async (payload) => void buried.push(payload),
    });
    const payload = newReading();
    await addReading(payload);
    for (let number = 1; number <= MAX_ATTEMPTS; number++) {
      await eventually(`try ${number}`, async () => tries === number && (await jobOf(payload))?.lockedBy === null);
      await jobsDueNow(database);
    }
    await eventually('the burial', async () => buried.length > 0);
    expect(buried).toEqual([payload]);
    await addReading(payload);
    await eventually('the fresh try', async () => tries === MAX_ATTEMPTS + 1);
  });

  /** The pool that has the job in hand is killed and found out. */
  async function killHolder(payload: Reading, changes: string) {
    await database.ownerDb.raw(
      `update graphile_worker._private_jobs
       set locked_by = 'killed', locked_at = now() - interval '2 minutes', attempts = attempts + 1,
         payload = cast(cast(payload as jsonb) || cast(? as jsonb) as json)
       where key = ?`,
      [changes, payload.fileId],
    );
    expect(await releaseSilentPools(database.db, 60_000)).toEqual(['killed']);
  }

  it('counts a worker that was killed as no try of the job in its hand, however often', async () => {
    const payload = newReading();
    await addReading(payload);
    for (let kill = 0; kill <= MAX_ATTEMPTS; kill++) await killHolder(payload, '{}');
    expect(await jobOf(payload)).toEqual({ attempts: 0, lockedBy: null });
    const done: Reading[] = [];
    await startWith({ run: async (read) => void done.push(read) });
    await eventually('the job', async () => done.length > 0);
    expect(done).toEqual([expect.objectContaining(payload)]);
    expect(log.errors).toEqual([]);
  });

  it('does a job that a worker died with alone, others side by side', async () => {
    const suspect = newReading();
    await addReading(suspect);
    await killHolder(suspect, '{}');
    for (let other = 0; other < 4; other++) await addReading(newReading());
    const besides = new Map<string, number>();
    let inHand = 0;
    await startWith({
      run: async ({ fileId }) => {
        inHand += 1;
        await new Promise((resolve) => setTimeout(resolve, 50));
        besides.set(fileId, inHand);
        inHand -= 1;
      },
    });
    await eventually('all five', async () => besides.size === 5);
    expect(besides.get(suspect.fileId)).toBe(1);
    expect(Math.max(...besides.values())).toBe(2);
  });

  it('gives up a job of which too many workers died that did nothing else, without trying it again', async () => {
    const [killer, neighbour] = [newReading(), newReading()];
    for (const payload of [killer, neighbour]) await addReading(payload);
    for (let kill = 0; kill < MOST_DEATHS_ALONE; kill++) {
      await killHolder(killer, '{"aloneIn":"killed"}');
      await killHolder(neighbour, '{"aloneIn":"another pool"}');
    }
    const done: string[] = [];
    const buried: [string, WhyDead][] = [];
    await startWith({
      run: async ({ fileId }) => void done.push(fileId),
      dead: async ({ fileId }, why) => void buried.push([fileId, why]),
    });
    await eventually('both', async () => done.length > 0 && buried.length > 0);
    expect(done).toEqual([neighbour.fileId]);
    expect(buried).toEqual([[killer.fileId, 'deaths']]);
    expect(await eventually('an empty queue', async () => (await jobOf(killer)) === null)).toBe(true);
    expect(log.errors.map(({ message }) => message).join()).toContain('workers die of');
  });

  it('does not blame a job that has come further than before', async () => {
    const payload = newReading();
    await addReading(payload);
    for (let kill = 1; kill < MOST_DEATHS_ALONE; kill++) await killHolder(payload, '{"aloneIn":"killed"}');
    let tries = 0;
    await startWith({
      run: async (_reading, progressed) => {
        tries += 1;
        if (tries > 1) return;
        await progressed();
        throw new Error('ended after some progress');
      },
    });
    await eventually('the broken-off try', async () => tries === 1 && (await jobOf(payload))?.lockedBy === null);
    await killHolder(payload, '{"aloneIn":"killed"}');
    await jobsDueNow(database);
    await eventually('the next', async () => tries === 2 && (await jobOf(payload)) === null);
  });

  it('says in whose hand a job is alone, so that its death can be told from another’s', async () => {
    const payload = newReading();
    await addReading(payload);
    await killHolder(payload, '{}');
    let aloneIn: unknown = null;
    await startWith({
      run: async () => {
        const { rows } = await database.ownerDb.raw<{ rows: { holder: string; aloneIn: string }[] }>(
          `select locked_by as holder, payload ->> 'aloneIn' as "aloneIn" from graphile_worker._private_jobs where key = ?`,
          [payload.fileId],
        );
        aloneIn = rows[0]?.holder === rows[0]?.aloneIn ? rows[0]?.aloneIn : null;
      },
    });
    await eventually('the job', async () => aloneIn !== null);
    expect(String(aloneIn)).not.toBe('');
  });

  it('waits for the job at hand when it is closed', async () => {
    let begun = false;
    let ended = false;
    await startWith({
      run: async () => {
        begun = true;
        await new Promise((resolve) => setTimeout(resolve, 400));
        ended = true;
      },
    });
    await addReading(newReading());
    await eventually('the job to begin', async () => begun);
    await worker?.close();
    worker = null;
    expect(ended).toBe(true);
    const { rows } = await database.db.raw<{ rows: unknown[] }>('select 1 from worker_pools');
    expect(rows).toEqual([]);
  });

  it('goes on after PostgreSQL has cut every connection of it', async () => {
    const done: Reading[] = [];
    await startWith({ run: async (payload) => void done.push(payload) });
    const cut = await database.db.raw<{ rowCount: number }>(
      `select pg_terminate_backend(pid) from pg_stat_activity
       where datname = current_database() and usename = current_user and pid <> pg_backend_pid()`,
    );
    expect(cut.rowCount).toBeGreaterThan(0);
    const payload = newReading();
    await eventually('a job that can be added', () =>
      addReading(payload).then(
        () => true,
        () => false,
      ),
    );
    await eventually('the job', async () => done.length > 0);
    expect(done).toEqual([payload]);
  });

  it('gives back the jobs of a pool that fell silent, and of none that lives', async () => {
    const [dead, alive] = [newReading(), newReading()];
    await addReading(dead);
    await addReading(alive);
    await beat(database.db, 'silent pool');
    await beat(database.db, 'living pool');
    const lock = `update graphile_worker._private_jobs set locked_by = ?, locked_at = now() - interval '2 minutes' where key = ?`;
    await database.ownerDb.raw(lock, ['silent pool', dead.fileId]);
    await database.ownerDb.raw(lock, ['living pool', alive.fileId]);
    await database.db.raw(`update worker_pools set seen_at = now() - interval '61 seconds' where id = 'silent pool'`);
    expect(await releaseSilentPools(database.db, 60_000)).toEqual(['silent pool']);
    expect((await jobOf(dead))?.lockedBy).toBeNull();
    expect((await jobOf(alive))?.lockedBy).toBe('living pool');
    expect(await releaseSilentPools(database.db, 60_000)).toEqual([]);
    await database.ownerDb.raw(lock, ['pool that died before its first beat', dead.fileId]);
    expect(await releaseSilentPools(database.db, 60_000)).toEqual(['pool that died before its first beat']);
    await database.db.raw('delete from worker_pools');
  });
});
