import knexPkg from 'knex';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { migrationSource } from '../../../migrations/source.ts';
import { prepareDatabase } from '../../../server/db/prepare-database.ts';
import { makeTestDatabase, type TestDatabase } from '../../support/test-database.ts';

const { knex } = knexPkg;

let database: TestDatabase;
beforeAll(async () => {
  database = await makeTestDatabase();
});
afterAll(() => database.drop());

/** Every table of the schema with its number of columns: enough to see that a migration came back whole. */
async function shape(): Promise<unknown> {
  const found = await database.ownerDb.raw(
    `select table_name, count(*)::int as columns from information_schema.columns
     where table_schema = 'public' and table_name not like 'knex%' group by 1 order by 1`,
  );
  return found.rows;
}

describe('the application login', () => {
  it('may add to the audit trail and read it', async () => {
    await database.db('audit_events').insert({ act: 'test.act' });
    expect(await database.db('audit_events').where({ act: 'test.act' })).toHaveLength(1);
  });

  it.each([
    ['change', `update audit_events set act = 'other'`],
    ['delete from', 'delete from audit_events'],
    ['empty', 'truncate audit_events'],
    ['drop', 'drop table audit_events'],
  ])('may not %s the audit trail', async (_what, statement) => {
    await expect(database.db.raw(statement)).rejects.toMatchObject({
      code: '42501', // insufficient_privilege, PostgreSQL documentation, appendix A
    });
  });

  it.each(['update', 'delete from'])('may not %s runs and brief versions: they are stored once', async (verb) => {
    for (const table of ['runs', 'brief_versions']) {
      const statement = verb === 'update' ? `update ${table} set id = id` : `delete from ${table}`;
      await expect(database.db.raw(statement)).rejects.toMatchObject({ code: '42501' });
    }
  });

  it('may not start a program or read a file of the server', async () => {
    await expect(database.db.raw(`copy audit_events to program 'cat'`)).rejects.toMatchObject({ code: '42501' });
    await expect(database.db.raw(`copy people from '/etc/passwd'`)).rejects.toMatchObject({ code: '42501' });
  });

  it('may not make tables, logins or databases, nor become another login', async () => {
    for (const statement of ['create table t (a int)', 'create role r', 'create database d', 'set role muslin_owner']) {
      await expect(database.db.raw(statement)).rejects.toMatchObject({ code: '42501' });
    }
  });

  it('may queue a job in a transaction, and the job is gone when that is rolled back', async () => {
    const queued = () => database.db('graphile_worker.jobs').where({ task_identifier: 'test-task' });
    await expect(
      database.db.transaction(async (trx) => {
        await trx.raw(`select graphile_worker.add_job('test-task', '{}'::json)`);
        throw new Error('taken back');
      }),
    ).rejects.toThrow('taken back');
    expect(await queued()).toHaveLength(0);
    await database.db.transaction((trx) => trx.raw(`select graphile_worker.add_job('test-task', '{}'::json)`));
    expect(await queued()).toHaveLength(1);
  });
});

describe('preparing a database', () => {
  it('is harmless the second time, and when two do it at once', async () => {
    const server = inject('databaseServer');
    const name = `prepared_${Date.now()}`;
    const [first] = await Promise.all([prepareDatabase(server, name), prepareDatabase(server, name)]);
    await prepareDatabase(server, name);
    const db = knex({ client: 'pg', connection: first.appUrl });
    try {
      await db('audit_events').insert({ act: 'test.kept' });
      await prepareDatabase(server, name);
      expect(await db('audit_events')).toHaveLength(1);
    } finally {
      await db.destroy();
    }
  });

  it('comes down to nothing and up again to the same tables', async () => {
    const before = await shape();
    const migrations = { migrationSource };
    await database.ownerDb.migrate.rollback(migrations, true);
    expect(await shape()).toEqual([]);
    await database.ownerDb.migrate.latest(migrations);
    expect(await shape()).toEqual(before);
  });
});
