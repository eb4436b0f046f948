/** The demo, seeded once in a run: the files that need it clone its database and its originals. */
import { existsSync, mkdirSync } from 'node:fs';
import { cp, rename } from 'node:fs/promises';
import path from 'node:path';
import { inject } from 'vitest';
import { seedDemo } from '../../server/builders/seed-demo.ts';
import { keepWorkerRunning } from '../../server/cli/worker-process.ts';
import { createFolderStore } from '../../server/storage/folder-store.ts';
import { eventually } from './eventually.ts';
import { keepLog } from './quiet-log.ts';
import { repositoryDir } from './run-command.ts';
import { asSuperuser, makeTestDatabase, type TestDatabase } from './test-database.ts';

const DEMO_DATABASE = 'muslin_demo';
const LONGEST_SEEDING_MS = 240_000;

export interface DemoHome {
  readonly originalsDir: string;
  readonly demoAccountsPath: string;
}

/** Where a home keeps what the demo has outside its database. */
export function demoHomeIn(folder: string): DemoHome {
  return { originalsDir: path.join(folder, 'originals'), demoAccountsPath: path.join(folder, 'demo-accounts.txt') };
}

/** Goes the main road with every file of the demo; the database it leaves is a template from then on. */
async function seedOnce(folder: string): Promise<void> {
  const unfinished = `${folder}.unfinished`;
  const uploadsDir = path.join(unfinished, 'uploads');
  mkdirSync(uploadsDir, { recursive: true });
  const { originalsDir, demoAccountsPath } = demoHomeIn(unfinished);
  const { db, ownerDb, databaseUrl } = await makeTestDatabase();
  const log = keepLog();
  const worker = keepWorkerRunning({ rootDir: repositoryDir, settings: { databaseUrl, originalsDir }, log });
  try {
    const deps = { db, storage: createFolderStore(originalsDir), uploadsDir, now: () => new Date() };
    await seedDemo({ deps, demoAccountsPath, log: () => undefined });
  } finally {
    await worker.stop();
    await db.destroy();
    await ownerDb.destroy();
  }
  await asSuperuser(`alter database ${new URL(databaseUrl).pathname.slice(1)} rename to ${DEMO_DATABASE}`);
  await asSuperuser(`alter database ${DEMO_DATABASE} with is_template true allow_connections false`);
  await rename(unfinished, folder);
}

/** True for the one file of the run that is to seed; the others wait for what it makes. */
function isFirst(folder: string): boolean {
  try {
    mkdirSync(`${folder}.begun`);
    return true;
  } catch {
    return false;
  }
}

/** A database that holds the demo, with what stands outside it put into `home`. */
export async function makeDemoDatabase(home: string): Promise<TestDatabase> {
  const folder = path.join(inject('sharedDir'), 'demo');
  if (isFirst(folder)) await seedOnce(folder);
  else await eventually('the demo', async () => existsSync(folder), LONGEST_SEEDING_MS);
  await cp(folder, home, { recursive: true });
  return makeTestDatabase(DEMO_DATABASE);
}
