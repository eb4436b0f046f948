import { existsSync } from 'node:fs';
import path from 'node:path';
import type { Knex } from 'knex';
import { connect } from '../db/connection.ts';
import { APP_LOGIN, databaseUrl } from '../db/prepare-database.ts';
import { clusterStatus, startCluster, stopCluster } from './cluster.ts';
import type { CommandContext } from './command.ts';
import { CouldNotRun } from './could-not-run.ts';
import { type Home, homePath, openHome } from './home.ts';
import { takeHome } from './home-lock.ts';

/** The name of the one database of a home. */
export const DATABASE = 'muslin';

/** The database of MUSLIN_HOME while it runs. */
export interface OpenHome {
  readonly home: Home;
  readonly port: number;
}

/**
 * Works on the cluster of MUSLIN_HOME. One that runs, under `npm start`, is left running; one that is down is started for the work and
 * stopped after it, and nobody else can start on that home meanwhile.
 * @throws CouldNotRun where there is no home with a database, or it does not answer
 */
export async function withHomeCluster<T>(
  { rootDir, callerDir }: Pick<CommandContext, 'rootDir' | 'callerDir'>,
  work: (open: OpenHome) => Promise<T>,
): Promise<T> {
  const dir = homePath({ rootDir, callerDir, named: process.env.MUSLIN_HOME ?? '' });
  // A command that looks something up makes no home where there is none.
  if (!existsSync(path.join(dir, 'pg-port'))) {
    throw new CouldNotRun(`There is no database in ${dir}. Set MUSLIN_HOME to the home that npm start uses.`);
  }
  const home = openHome(dir);
  const status = clusterStatus(home.dir);
  return status.state === 'running' ? await work({ home, port: status.port }) : await withStartedCluster(home, work);
}

/** Starts the cluster of a home for the work, making it at first, and stops it after it. @throws CouldNotRun while somebody is there */
export async function withStartedCluster<T>(home: Home, work: (open: OpenHome) => Promise<T>): Promise<T> {
  const lock = takeHome({ dir: home.dir, lockFile: home.lockFile, address: 'a muslin command works on its database' });
  try {
    const { port } = await startCluster({ homeDir: home.dir, superuserPassword: home.secrets.superuserPassword });
    return await work({ home, port });
  } finally {
    await stopCluster(home.dir);
    lock.giveBack();
  }
}

/** Works on the database of MUSLIN_HOME as the application: see `withHomeCluster`. */
export async function withHomeDatabase<T>(
  context: Pick<CommandContext, 'rootDir' | 'callerDir'>,
  work: (db: Knex) => Promise<T>,
): Promise<T> {
  return await withHomeCluster(context, ({ home, port }) => withConnection(home, { port, work }));
}

async function withConnection<T>(
  { secrets }: Home,
  { port, work }: { port: number; work: (db: Knex) => Promise<T> },
): Promise<T> {
  const login = { name: APP_LOGIN, password: secrets.appPassword };
  const url = databaseUrl({ login, port, database: DATABASE });
  const db = connect({ databaseUrl: url, applicationName: 'muslin command', maxConnections: 2 });
  try {
    return await work(db);
  } finally {
    await db.destroy();
  }
}
