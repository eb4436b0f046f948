/** Vitest's global set-up of the suites that need PostgreSQL: one cluster, one migrated template that each test clones. */
import { mkdtempSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import pg from 'pg';
import type { TestProject } from 'vitest/node';
import { type DatabaseServer, databaseUrl, prepareDatabase } from '../../server/db/prepare-database.ts';
import { startThrowawayCluster } from './throwaway-cluster.ts';

export const TEMPLATE_DATABASE = 'muslin_template';

declare module 'vitest' {
  interface ProvidedContext {
    databaseServer: DatabaseServer;
    /** A folder of this run, for what its files make once and share. */
    sharedDir: string;
  }
}

export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  const cluster = await startThrowawayCluster();
  try {
    await prepareDatabase(cluster.server, TEMPLATE_DATABASE);
    const { superuser, port } = cluster.server;
    const admin = new pg.Client({ connectionString: databaseUrl({ login: superuser, port, database: 'postgres' }) });
    await admin.connect();
    // Nobody can sit in the template, so that it can be cloned at any time.
    await admin.query(`alter database ${TEMPLATE_DATABASE} with is_template true allow_connections false`);
    await admin.end();
  } catch (error) {
    await cluster.stop();
    throw error;
  }
  const sharedDir = mkdtempSync(path.join(tmpdir(), 'muslin-shared-'));
  project.provide('databaseServer', cluster.server);
  project.provide('sharedDir', sharedDir);
  return async () => {
    await cluster.stop();
    await rm(sharedDir, { recursive: true, force: true });
  };
}
