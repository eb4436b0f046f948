import type { Knex } from 'knex';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { recordAuditEvent } from '../../../server/db/record-audit-event.ts';
import { eventually } from '../../support/eventually.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await makeTestDatabase();
});
afterAll(() => database.drop());

/** Commits that wait for a lock. */
async function waiting(): Promise<number> {
  const { rows } = await database.db.raw<{ rows: { waiting: number }[] }>(
    `select count(*)::integer as waiting from pg_stat_activity
     where datname = current_database() and wait_event_type = 'Lock' and lower(query) like 'commit%'`,
  );
  return rows[0]?.waiting ?? 0;
}

test('acts that are written down before they are done and after wait for one another in one order, never in a ring', async () => {
  const [{ id: teamId }] = await database.db('teams').insert({ name: 'Team' }, ['id']);
  const note = (transaction: Knex.Transaction) =>
    recordAuditEvent(transaction, { teamId, personId: null, act: 'site made', subject: {}, requestId: null });
  const change = (transaction: Knex.Transaction, name: string) =>
    transaction('programmes').insert({ team_id: teamId, name });
  await database.db.transaction(note);
  const holder = await database.ownerDb.transaction();
  await holder.raw('select 1 from audit_chains where team_id = ? for update', [teamId]);
  const noteFirst = database.db.transaction(async (transaction) => {
    await note(transaction);
    await change(transaction, 'One');
  });
  await eventually('the first commit waits', async () => (await waiting()) === 1);
  const noteLast = database.db.transaction(async (transaction) => {
    await change(transaction, 'Two');
    await note(transaction);
  });
  await eventually('both commits wait', async () => (await waiting()) === 2);
  await holder.commit();
  expect(await Promise.allSettled([noteFirst, noteLast])).toMatchObject([
    { status: 'fulfilled' },
    { status: 'fulfilled' },
  ]);
});
