/** PostgreSQL's own programs that write a database out and read it in again, as streams. */
import { type ChildProcess, spawn } from 'node:child_process';
import path from 'node:path';
import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { CouldNotRun } from '../could-not-run.ts';
import { findPostgresPrograms } from '../postgres-programs.ts';

interface Dumping {
  /** Address with the owner's login. */
  readonly ownerUrl: string;
  /** The moment that is dumped, held open by another connection. */
  readonly snapshotId: string;
  readonly signal: AbortSignal;
}

/** The dump as it is made; `done` rejects when the program says that it is not whole. */
export function dumpDatabase({ ownerUrl, snapshotId, signal }: Dumping): { dump: Readable; done: Promise<void> } {
  const child = start('pg_dump', ['--format=custom', `--snapshot=${snapshotId}`], { ownerUrl, signal });
  child.stdin?.end();
  if (child.stdout === null) throw new CouldNotRun('pg_dump gives nothing to read.');
  return { dump: child.stdout, done: endOf(child, 'pg_dump') };
}

/** Fills an empty database: all of the dump, or nothing. */
export async function fillDatabase(
  ownerUrl: string,
  { dump, signal }: { dump: Readable; signal: AbortSignal },
): Promise<void> {
  const database = new URL(ownerUrl).pathname.slice(1);
  const all = ['--exit-on-error', '--single-transaction', '--no-comments', `--dbname=${database}`];
  const child = start('pg_restore', all, { ownerUrl, signal });
  child.stdout?.resume();
  const done = endOf(child, 'pg_restore');
  if (child.stdin === null) throw new CouldNotRun('pg_restore takes nothing in.');
  // When the program ends early the pipe breaks, and what the program said is what matters.
  const fed = pipeline(dump, child.stdin).catch((error: unknown) => error);
  await done;
  const failed = await fed;
  if (failed instanceof Error) throw failed;
}

function start(name: string, args: readonly string[], at: { ownerUrl: string; signal: AbortSignal }): ChildProcess {
  const bin = findPostgresPrograms();
  if (bin === null) throw new CouldNotRun('PostgreSQL is not installed. Install it with: apt-get install postgresql');
  const { hostname, port, username, password, pathname } = new URL(at.ownerUrl);
  return spawn(path.join(bin, name), [...args], {
    cwd: '/',
    // A Ctrl-C in the terminal reaches us alone, and we end it.
    detached: true,
    signal: at.signal,
    stdio: ['pipe', 'pipe', 'pipe'],
    env: {
      PATH: process.env.PATH ?? '/usr/bin:/bin',
      LC_ALL: 'C.UTF-8',
      PGHOST: hostname,
      PGPORT: port,
      PGUSER: username,
      PGPASSWORD: decodeURIComponent(password),
      PGDATABASE: pathname.slice(1),
    },
  });
}

function endOf(child: ChildProcess, name: string): Promise<void> {
  let said = '';
  child.stderr?.setEncoding('utf8').on('data', (text: string) => {
    said = `${said}${text}`.slice(-4000);
  });
  const ended = new Promise<void>((resolve, reject) => {
    child.once('error', reject);
    child.once('close', (code) =>
      code === 0 ? resolve() : reject(new CouldNotRun(`${name} ended with code ${code}:\n${said.trim()}`)),
    );
  });
  // Whoever waits for it may look away for a while, at the stream.
  ended.catch(() => undefined);
  return ended;
}
