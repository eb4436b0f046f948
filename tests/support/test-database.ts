import { randomBytes } from 'node:crypto';
import knexPkg, { type Knex } from 'knex';
import pg from 'pg';
import { inject } from 'vitest';
import { APP_LOGIN, databaseUrl, OWNER_LOGIN } from '../../server/db/prepare-database.ts';
import { TEMPLATE_DATABASE } from './database.ts';

const { knex } = knexPkg;

export interface TestDatabase {
  /** As the application's login, muslin_app. */
  readonly db: Knex;
  /** As muslin_owner, to look at and prepare what the application may not. */
  readonly ownerDb: Knex;
  /** Address with the application's login. */
  readonly databaseUrl: string;
  /** Address with the owner's login. */
  readonly ownerUrl: string;
  /** Ends every connection and removes the database. */
  drop(): Promise<void>;
}

/** Runs one statement as the superuser, outside every database of a test. */
export async function asSuperuser(statement: string): Promise<void> {
  const { superuser, port } = inject('databaseServer');
  const admin = new pg.Client({ connectionString: databaseUrl({ login: superuser, port, database: 'postgres' }) });
  await admin.connect();
  try {
    await admin.query(statement);
  } finally {
    await admin.end();
  }
}

/** A database of its own for a test file: a clone of the migrated template, empty of rows, or of another template. */
export async function makeTestDatabase(template = TEMPLATE_DATABASE): Promise<TestDatabase> {
  const { port, ownerPassword, appPassword } = inject('databaseServer');
  const database = `test_${randomBytes(6).toString('hex')}`;
  await asSuperuser(`create database ${database} template ${template} owner ${OWNER_LOGIN}`);
  const appUrl = databaseUrl({ login: { name: APP_LOGIN, password: appPassword }, port, database });
  const ownerUrl = databaseUrl({ login: { name: OWNER_LOGIN, password: ownerPassword }, port, database });
  const db = knex({ client: 'pg', connection: appUrl, pool: { min: 0, max: 6 } });
  const ownerDb = knex({ client: 'pg', connection: ownerUrl, pool: { min: 0, max: 2 } });
  return {
    db,
    ownerDb,
    databaseUrl: appUrl,
    ownerUrl,
    drop: async () => {
      await db.destroy();
      await ownerDb.destroy();
      await asSuperuser(`drop database if exists ${database} with (force)`);
    },
  };
}
