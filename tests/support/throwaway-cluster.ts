import { spawn } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { mkdtempSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { SUPERUSER, startCluster } from '../../server/cli/cluster.ts';
import { databaseServerUser, findPostgresPrograms } from '../../server/cli/postgres-programs.ts';
import type { DatabaseServer } from '../../server/db/prepare-database.ts';

export interface ThrowawayCluster {
  readonly server: DatabaseServer;
  stop(): Promise<void>;
}

/** A cluster in a folder of its own that disappears with this process, even if it is killed. */
export async function startThrowawayCluster(): Promise<ThrowawayCluster> {
  const homeDir = mkdtempSync(path.join(os.tmpdir(), 'muslin-test-'));
  const superuser = { name: SUPERUSER, password: randomBytes(18).toString('base64url') };
  const { port, folder } = await startCluster({ homeDir, superuserPassword: superuser.password, throwaway: true });

  const task = {
    pgCtl: path.join(findPostgresPrograms() ?? '', 'pg_ctl'),
    dataDir: path.join(folder, 'data'),
    user: databaseServerUser() ?? {},
    folders: [folder, homeDir],
  };
  const guard = spawn(process.execPath, [path.join(import.meta.dirname, 'cluster-guard.mjs'), JSON.stringify(task)], {
    cwd: '/',
    detached: true,
    stdio: ['pipe', 'ignore', 'ignore'],
  });
  guard.unref();
  const gone = new Promise<void>((resolve) => guard.once('exit', () => resolve()));
  return {
    server: {
      port,
      superuser,
      ownerPassword: randomBytes(18).toString('base64url'),
      appPassword: randomBytes(18).toString('base64url'),
    },
    stop: async () => {
      guard.ref();
      guard.stdin.end();
      await gone;
    },
  };
}
