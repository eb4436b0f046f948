import { randomUUID } from 'node:crypto';
import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { inTransaction } from '../../../server/db/in-transaction.ts';
import { notifyTeam, openTeamFeed, type TeamFeed } from '../../../server/jobs/team-feed.ts';
import type { TeamEvent } from '../../../src/contract/team-events.ts';
import { eventually } from '../../support/eventually.ts';
import { type KeptLog, keepLog } from '../../support/quiet-log.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

let database: TestDatabase;
let feed: TeamFeed;
let log: KeptLog;

beforeAll(async () => {
  database = await makeTestDatabase();
  log = keepLog();
  feed = await openTeamFeed({ databaseUrl: database.databaseUrl, log });
});
afterEach(() => {
  expect(log.errors.filter(({ message }) => !message.startsWith('listening was cut off'))).toEqual([]);
});
afterAll(async () => {
  await feed.close();
  await database.drop();
});

const step = (fileId: string, name: 'received' | 'reading' | 'reducing'): TeamEvent => ({
  kind: 'weather-file',
  fileId,
  status: 'reading',
  step: name,
});

/** Reads from the moment of the call until the stream ends. */
function collect(teamId: string): { events: TeamEvent[]; ended: Promise<void>; stop: () => void } {
  const stopping = new AbortController();
  const events: TeamEvent[] = [];
  const stream = feed.watch(teamId, stopping.signal);
  const ended = (async () => {
    for await (const event of stream) events.push(event);
  })();
  return { events, ended, stop: () => stopping.abort() };
}

describe("a team's feed of events", () => {
  it('tells events in the order of their commits', async () => {
    const [teamId, fileId] = [randomUUID(), randomUUID()];
    const told = collect(teamId);
    const steps = (['received', 'reading', 'reducing'] as const).map((name) => step(fileId, name));
    for (const event of steps) await notifyTeam(database.db, { teamId, event });
    await eventually('three events', async () => told.events.length === 3);
    told.stop();
    await told.ended;
    expect(told.events).toEqual(steps);
  });

  it('tells nothing of a transaction that was taken back, and nothing of another team', async () => {
    const [teamId, otherTeam, fileId] = [randomUUID(), randomUUID(), randomUUID()];
    const told = collect(teamId);
    const takenBack = inTransaction(database.db, async (transaction) => {
      await notifyTeam(transaction, { teamId, event: step(fileId, 'received') });
      throw new Error('taken back');
    });
    await expect(takenBack).rejects.toThrow('taken back');
    await notifyTeam(database.db, { teamId: otherTeam, event: step(fileId, 'reading') });
    await notifyTeam(database.db, { teamId, event: step(fileId, 'reducing') });
    await eventually('one event', async () => told.events.length > 0);
    told.stop();
    await told.ended;
    expect(told.events).toEqual([step(fileId, 'reducing')]);
  });

  it('ends with the signal, also when it was given up before it began', async () => {
    const stopping = new AbortController();
    stopping.abort();
    let events = 0;
    for await (const _event of feed.watch(randomUUID(), stopping.signal)) events += 1;
    expect(events).toBe(0);
  });

  it('connects again when PostgreSQL cuts it off, ends those who watched, and then tells on', async () => {
    const [teamId, fileId] = [randomUUID(), randomUUID()];
    const before = collect(teamId);
    const cut = await database.db.raw<{ rowCount: number }>(
      `select pg_terminate_backend(pid) from pg_stat_activity
       where datname = current_database() and query ilike 'listen%' and pid <> pg_backend_pid()`,
    );
    expect(cut.rowCount).toBe(1);
    await before.ended;
    const after = collect(teamId);
    await notifyTeam(database.db, { teamId, event: step(fileId, 'received') });
    await eventually('the event after the cut', async () => after.events.length === 1);
    after.stop();
    await after.ended;
    expect(log.errors.length).toBeGreaterThan(0);
  });

  it('cuts off a reader that does not read, and keeps nothing for it', async () => {
    const teamId = randomUUID();
    const stopping = new AbortController();
    const stream = feed.watch(teamId, stopping.signal);
    const sent = 1005;
    await database.db.raw(
      `select pg_notify('team_events', json_build_object('teamId', ?::text, 'event', json_build_object(
         'kind', 'run', 'runId', gen_random_uuid(), 'stationId', gen_random_uuid()))::text)
       from generate_series(1, ?::integer)`,
      [teamId, sent],
    );
    await sleep(300);
    let read = 0;
    for await (const _event of stream) read += 1;
    expect(read).toBe(1000);
  });
});
