/** The whole product for tests in the browser: web in this process, worker in its own, a database and a home of its own. */
import { mkdirSync, mkdtempSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { buildClient } from '../../server/cli/build-client.ts';
import { keepWorkerRunning } from '../../server/cli/worker-process.ts';
import { connect } from '../../server/db/connection.ts';
import type { Deps } from '../../server/deps.ts';
import { openTeamFeed } from '../../server/jobs/team-feed.ts';
import { createFolderStore } from '../../server/storage/folder-store.ts';
import { startWeb } from '../../server/web.ts';
import { type KeptLog, keepLog } from './quiet-log.ts';
import { demoHomeIn, makeDemoDatabase } from './seeded-demo.ts';
import { makeTestDatabase } from './test-database.ts';

const ROOT = path.resolve(import.meta.dirname, '../..');

export interface RunningProduct {
  readonly origin: string;
  readonly deps: Deps;
  readonly demoAccountsPath: string;
  /** What the server wrote about itself. */
  readonly log: KeptLog;
  close(): Promise<void>;
}

/** @param holding 'demo' for a product that has been seeded, through the main road, once for all files of the run */
export async function startProduct(holding: 'nothing' | 'demo' = 'nothing'): Promise<RunningProduct> {
  const { dir: clientDir } = await buildClient(ROOT);
  const home = mkdtempSync(path.join(tmpdir(), 'muslin-e2e-'));
  const database = holding === 'demo' ? await makeDemoDatabase(home) : await makeTestDatabase();
  const uploadsDir = path.join(home, 'uploads');
  mkdirSync(uploadsDir, { recursive: true });
  const log = keepLog();
  const { databaseUrl } = database;
  const { originalsDir, demoAccountsPath } = demoHomeIn(home);
  const db = connect({ databaseUrl });
  const feed = await openTeamFeed({ databaseUrl, log });
  const deps: Deps = {
    db,
    databaseUrl,
    now: () => new Date(),
    storage: createFolderStore(originalsDir),
    uploadsDir,
    publicUrl: 'https://muslin.example',
    sendsMail: false,
    sessionSecrets: ['a session secret for tests in the browser'],
    trustProxy: 'loopback',
    clientDir,
    basemapPath: path.join(ROOT, 'data/basemap/basemap.pmtiles'),
    feed,
    log,
  };
  const worker = keepWorkerRunning({ rootDir: ROOT, settings: { databaseUrl, originalsDir }, log });
  const web = await startWeb({
    config: { home: null, host: '127.0.0.1', port: 0, seed: 'none', trustProxy: 'loopback' },
    deps,
  });
  return {
    origin: web.url,
    deps,
    demoAccountsPath,
    log,
    async close() {
      await web.close();
      await worker.stop();
      await feed.close();
      await db.destroy();
      await database.drop();
      await rm(home, { recursive: true, force: true });
    },
  };
}
