import { spawnSync } from 'node:child_process';
import { createHash, randomBytes } from 'node:crypto';
import {
  chmodSync,
  chownSync,
  existsSync,
  mkdirSync,
  readFileSync,
  realpathSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import path from 'node:path';
import { CouldNotRun } from './could-not-run.ts';
import type { ProgramUser } from './run-program.ts';

/** Where clusters stand that the server's user could not reach inside their home: one folder per home. */
const SHARED_PARENT = '/var/lib/muslin';
const NOTE = 'cluster';

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

/** A new folder outside the home, noted in the home: another home at the same path must not meet this one's data. */
function newOutsideFolder(homeDir: string, user: ProgramUser): string {
  mkdirSync(SHARED_PARENT, { recursive: true, mode: 0o755 });
  const parent = statSync(SHARED_PARENT);
  if (parent.uid !== 0 || (parent.mode & 0o022) !== 0) {
    throw new CouldNotRun(`${SHARED_PARENT} must belong to root and be writable by nobody else.`);
  }
  const ofHome = createHash('sha256').update(realpathSync(homeDir)).digest('hex').slice(0, 16);
  const folder = ownFolder(path.join(SHARED_PARENT, `${ofHome}-${randomBytes(4).toString('hex')}`), user);
  writeFileSync(path.join(homeDir, NOTE), `${folder}\n`, { mode: 0o600 });
  return folder;
}

/**
 * The folder of a home's cluster: `pg` inside the home, or one under /var/lib/muslin, noted in the home's file `cluster`, when the
 * server's user cannot walk to the home (root's own folders). Made if need be.
 */
export function clusterFolder(homeDir: string, user: ProgramUser | null): string {
  const note = path.join(homeDir, NOTE);
  if (existsSync(note)) return ownFolder(readFileSync(note, 'utf8').trim(), user);
  const inside = path.join(homeDir, 'pg');
  if (user === null || openForWalking(homeDir, user)) return ownFolder(inside, user);
  if (existsSync(inside)) {
    throw new CouldNotRun(
      `The database in ${inside} can no longer be reached by the user who runs it. Let others walk through the folders above it (chmod o+x), or move the home where they may.`,
    );
  }
  return newOutsideFolder(homeDir, user);
}
