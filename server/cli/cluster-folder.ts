import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { chmodSync, chownSync, mkdirSync, realpathSync, statSync } from 'node:fs';
import path from 'node:path';
import { CouldNotRun } from './could-not-run.ts';
import type { ProgramUser } from './run-program.ts';

/** Where clusters stand that the server's user could not reach inside their home: one folder per home. */
const SHARED_PARENT = '/var/lib/muslin';

function canWalkTo(folder: string, user: ProgramUser): boolean {
  return spawnSync('/bin/sh', ['-c', 'cd "$0"', folder], { ...user, cwd: '/', stdio: 'ignore' }).status === 0;
}

/** Makes the folder, or takes an existing one only if the server's user owns it and nobody else can write there. */
function ownFolder(folder: string, user: ProgramUser | null): string {
  const made = mkdirSync(folder, { recursive: true, mode: 0o700 });
  if (made !== undefined && user !== null) chownSync(folder, user.uid, user.gid);
  const found = statSync(folder);
  const uid = user?.uid ?? process.getuid?.();
  if (found.uid !== uid) {
    throw new CouldNotRun(
      `The database folder ${folder} belongs to another user (number ${found.uid}). Start Muslin as the user who made it, or choose another MUSLIN_HOME.`,
    );
  }
  if ((found.mode & 0o022) !== 0) {
    throw new CouldNotRun(
      `The database folder ${folder} can be written by others. Make it private: chmod 700 ${folder}`,
    );
  }
  return folder;
}

/** Gives others the right to walk through the home (not to list it), and tells whether the server's user gets there. */
function openForWalking(homeDir: string, user: ProgramUser): boolean {
  chmodSync(homeDir, (statSync(homeDir).mode & 0o7777) | 0o001);
  return canWalkTo(homeDir, user);
}

/**
 * The folder of a home's cluster: `pg` inside the home, or one under /var/lib/muslin when the server's user cannot walk to the
 * home (root's own folders). Made if need be.
 */
export function clusterFolder(homeDir: string, user: ProgramUser | null): string {
  if (user === null || openForWalking(homeDir, user)) return ownFolder(path.join(homeDir, 'pg'), user);
  const name = createHash('sha256').update(realpathSync(homeDir)).digest('hex').slice(0, 16);
  mkdirSync(SHARED_PARENT, { recursive: true, mode: 0o755 });
  const parent = statSync(SHARED_PARENT);
  if (parent.uid !== 0 || (parent.mode & 0o022) !== 0) {
    throw new CouldNotRun(`${SHARED_PARENT} must belong to root and be writable by nobody else.`);
  }
  return ownFolder(path.join(SHARED_PARENT, name), user);
}
