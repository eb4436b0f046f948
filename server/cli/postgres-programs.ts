import { existsSync, readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { CouldNotRun } from './could-not-run.ts';
import type { ProgramUser } from './run-program.ts';

const DEBIAN_FOLDER = '/usr/lib/postgresql';

/** Folder of the newest PostgreSQL server programs that Debian has installed; null without any. */
export function findPostgresPrograms(): string | null {
  if (!existsSync(DEBIAN_FOLDER)) return null;
  const complete = readdirSync(DEBIAN_FOLDER)
    .map((version) => ({ version: Number(version), folder: path.join(DEBIAN_FOLDER, version, 'bin') }))
    .filter(({ folder }) => ['initdb', 'pg_ctl', 'postgres'].every((name) => existsSync(path.join(folder, name))))
    .sort((a, b) => b.version - a.version);
  return complete[0]?.folder ?? null;
}

/** The user that runs the database server: null for ourselves; as root, who may not, the package's own or `nobody`. */
export function databaseServerUser(): ProgramUser | null {
  if (process.getuid?.() !== 0) return null;
  const lines = readFileSync('/etc/passwd', 'utf8').split('\n');
  for (const name of ['postgres', 'nobody']) {
    const fields = lines.find((line) => line.startsWith(`${name}:`))?.split(':');
    if (fields) return { uid: Number(fields[2]), gid: Number(fields[3]) };
  }
  throw new CouldNotRun(
    'PostgreSQL does not run as root, and this machine has neither a user "postgres" nor "nobody".',
  );
}
