import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import * as z from 'zod/mini';
import { APP_LOGIN, databaseUrl } from '../db/prepare-database.ts';
import { CouldNotRun } from './could-not-run.ts';
import { homePath, openHome } from './home.ts';

/** What a worker works on; the start program tells its own as JSON in the environment variable MUSLIN_WORKER. */
const WorkerSettings = z.strictObject({
  databaseUrl: z.string(),
  originalsDir: z.string(),
  /** Where links in mails lead; left out: as the environment says. */
  publicUrl: z.optional(z.string()),
});
export type WorkerSettings = z.infer<typeof WorkerSettings>;

const VARIABLE = 'MUSLIN_WORKER';

export function workerEnvironment(settings: WorkerSettings): Record<string, string> {
  return { [VARIABLE]: JSON.stringify(settings) };
}

interface Caller {
  readonly rootDir: string;
  readonly callerDir: string;
  readonly env: NodeJS.ProcessEnv;
}

/**
 * What to work on: as the start program says; else the database of DATABASE_URL; else that of a home on this machine that has been
 * started.
 * @throws CouldNotRun when there is none of them
 */
export function readWorkerSettings({ rootDir, callerDir, env }: Caller): WorkerSettings {
  const told = env[VARIABLE];
  if (told !== undefined) return z.parse(WorkerSettings, JSON.parse(told));
  const dir = homePath({ rootDir, callerDir, named: env.MUSLIN_HOME?.trim() ?? '' });
  if (env.DATABASE_URL) return { databaseUrl: env.DATABASE_URL, originalsDir: path.join(dir, 'originals') };
  const portFile = path.join(dir, 'pg-port');
  if (!existsSync(portFile)) {
    throw new CouldNotRun(
      `No database in ${dir}. Start Muslin there first (npm start), name another MUSLIN_HOME, or give DATABASE_URL and an object store.`,
    );
  }
  const home = openHome(dir);
  const login = { name: APP_LOGIN, password: home.secrets.appPassword };
  const port = Number(readFileSync(portFile, 'utf8').trim());
  return { databaseUrl: databaseUrl({ login, port, database: 'muslin' }), originalsDir: home.originalsDir };
}
