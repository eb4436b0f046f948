/**
 * A private PostgreSQL cluster: on loopback, on a port of its own, started and stopped by us, open to nobody without one of
 * our passwords. One per home, and one per test run.
 */
import { appendFileSync, chownSync, existsSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { clusterFolder } from './cluster-folder.ts';
import { CouldNotRun } from './could-not-run.ts';
import { answersOn, freePort, portIsFree } from './free-port.ts';
import { databaseServerUser, findPostgresPrograms } from './postgres-programs.ts';
import { type ProgramOutcome, type ProgramUser, runProgram } from './run-program.ts';

/** The superuser is used by the start program alone. */
export const SUPERUSER = 'muslin_superuser';

/** After a crash the old backends need a moment to let go of the shared memory. */
const START_TRIES = 12;
const START_PAUSE_MS = 500;
const RUNNING_LIMIT_MS = 60_000;
const WATCH_EVERY_MS = 2_000;

export interface ClusterOptions {
  readonly homeDir: string;
  readonly superuserPassword: string;
  /** For tests alone: gives durability up for speed. */
  readonly throwaway?: boolean;
}

export interface StartedCluster {
  readonly port: number;
  /** Where its files are: see `cluster-folder.ts`. */
  readonly folder: string;
  /** False when it was running already. */
  readonly startedNow: boolean;
}

interface Place {
  readonly bin: string;
  readonly user: ProgramUser | null;
  readonly folder: string;
  readonly dataDir: string;
  readonly logFile: string;
  readonly portFile: string;
}

function placeOf(homeDir: string): Place {
  const bin = findPostgresPrograms();
  if (bin === null) throw new CouldNotRun('PostgreSQL is not installed. Install it with: apt-get install postgresql');
  const user = databaseServerUser();
  const folder = clusterFolder(homeDir, user);
  return {
    bin,
    user,
    folder,
    dataDir: path.join(folder, 'data'),
    logFile: path.join(folder, 'server.log'),
    portFile: path.join(homeDir, 'pg-port'),
  };
}

function program(place: Place, name: string, args: readonly string[], silent = false): Promise<ProgramOutcome> {
  const env = { PATH: process.env.PATH ?? '/usr/bin:/bin', LC_ALL: 'C.UTF-8', PGTZ: 'UTC' };
  return runProgram({ program: path.join(place.bin, name), args, user: place.user, env, silent });
}

/** Writes a file that the server's user may read and nobody else. */
function writeForServer(place: Place, file: string, text: string): void {
  writeFileSync(file, text, { mode: 0o600 });
  if (place.user !== null) chownSync(file, place.user.uid, place.user.gid);
}

/**
 * Looks at the process itself: `pg_ctl status` calls a killed server "running" while nobody has collected the dead process,
 * and its stale lock file would block the next start, so that file is removed here.
 */
function serverRuns(dataDir: string): boolean {
  const lockFile = path.join(dataDir, 'postmaster.pid');
  if (!existsSync(lockFile)) return false;
  const pid = readFileSync(lockFile, 'utf8').split('\n')[0]?.trim() ?? '';
  try {
    const state = readFileSync(`/proc/${pid}/stat`, 'utf8').replace(/^.*\) /s, '')[0];
    const words = readFileSync(`/proc/${pid}/cmdline`, 'utf8').split('\0');
    if (state !== 'Z' && state !== 'X' && words.includes(dataDir)) return true;
  } catch {
    // no such process
  }
  rmSync(lockFile, { force: true });
  return false;
}

/** Made beside its place and moved there when complete: an interrupted start leaves nothing that looks like a cluster. */
async function makeCluster(place: Place, superuserPassword: string): Promise<void> {
  const unfinished = path.join(place.folder, 'data.unfinished');
  const passwordFile = path.join(place.folder, 'password.once');
  rmSync(unfinished, { recursive: true, force: true });
  rmSync(passwordFile, { force: true });
  writeForServer(place, passwordFile, `${superuserPassword}\n`);
  const login = ['-U', SUPERUSER, '-A', 'scram-sha-256', '--pwfile', passwordFile];
  const how = ['-E', 'UTF8', '--locale=C.UTF-8', '--no-sync', '--no-instructions'];
  const made = await program(place, 'initdb', ['-D', unfinished, ...login, ...how]);
  rmSync(passwordFile, { force: true });
  if (made.code !== 0) throw new CouldNotRun(`PostgreSQL could not make its files in ${place.folder}:\n${made.output}`);
  appendFileSync(path.join(unfinished, 'postgresql.conf'), "\ninclude = 'conf.local'\n");
  renameSync(unfinished, place.dataDir);
}

function writeSettings(place: Place, { port, throwaway }: { port: number; throwaway: boolean }): void {
  const settings: Record<string, string | number> = {
    port,
    listen_addresses: '127.0.0.1',
    unix_socket_directories: '',
    max_connections: 100,
    shared_buffers: '128MB',
    timezone: 'UTC',
    log_timezone: 'UTC',
    ...(throwaway ? { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' } : {}),
  };
  const lines = Object.entries(settings).map(([name, value]) => `${name} = '${value}'\n`);
  writeForServer(place, path.join(place.dataDir, 'conf.local'), lines.join(''));
}

function keptPort(place: Place): number | null {
  if (!existsSync(place.portFile)) return null;
  const port = Number(readFileSync(place.portFile, 'utf8'));
  return Number.isInteger(port) && port > 0 ? port : null;
}

async function startServer(place: Place, throwaway: boolean): Promise<number> {
  for (let attempt = 1; ; attempt += 1) {
    const kept = keptPort(place);
    const port = kept !== null && (await portIsFree(kept)) ? kept : await freePort();
    writeFileSync(place.portFile, `${port}\n`, { mode: 0o600 });
    writeSettings(place, { port, throwaway });
    const start = ['-D', place.dataDir, '-l', place.logFile, '-w', '-t', '60', 'start'];
    const started = await program(place, 'pg_ctl', start, true);
    if (started.code === 0) return port;
    // pg_ctl gives up waiting before a slow server gives up starting.
    await program(place, 'pg_ctl', ['-D', place.dataDir, '-m', 'immediate', '-w', 'stop'], true);
    if (attempt === START_TRIES) {
      const log = existsSync(place.logFile) ? readFileSync(place.logFile, 'utf8').slice(-2000) : '';
      throw new CouldNotRun(`PostgreSQL did not start. The end of its log ${place.logFile}:\n${log}`);
    }
    await sleep(START_PAUSE_MS);
  }
}

/**
 * Port of the server that runs already, once it answers: it may be starting up, going down or, killed a moment ago, not yet
 * be seen as dead.
 */
async function runningPort(place: Place): Promise<number | null> {
  const until = Date.now() + RUNNING_LIMIT_MS;
  while (serverRuns(place.dataDir)) {
    const port = keptPort(place);
    if (port !== null && (await answersOn(port))) return port;
    if (Date.now() > until) throw new CouldNotRun(`The PostgreSQL server in ${place.folder} runs but does not answer.`);
    await sleep(200);
  }
  return null;
}

/** Starts the cluster of a home, making it at first; a running one is left as it is. */
export async function startCluster(options: ClusterOptions): Promise<StartedCluster> {
  const place = placeOf(options.homeDir);
  const running = await runningPort(place);
  if (running !== null) return { port: running, folder: place.folder, startedNow: false };
  if (!existsSync(path.join(place.dataDir, 'PG_VERSION'))) await makeCluster(place, options.superuserPassword);
  const port = await startServer(place, options.throwaway ?? false);
  return { port, folder: place.folder, startedNow: true };
}

/** Stops the cluster of a home; nothing happens when it is down. */
export async function stopCluster(homeDir: string): Promise<void> {
  const place = placeOf(homeDir);
  if (!serverRuns(place.dataDir)) return;
  const stopped = await program(place, 'pg_ctl', ['-D', place.dataDir, '-m', 'fast', '-w', '-t', '60', 'stop']);
  if (stopped.code !== 0 && serverRuns(place.dataDir))
    throw new CouldNotRun(`PostgreSQL did not stop:\n${stopped.output}`);
}

export type ClusterStatus = { readonly state: 'stopped' } | { readonly state: 'running'; readonly port: number };

export function clusterStatus(homeDir: string): ClusterStatus {
  const place = placeOf(homeDir);
  const port = keptPort(place);
  return port !== null && serverRuns(place.dataDir) ? { state: 'running', port } : { state: 'stopped' };
}

/** Starts the cluster again whenever its server is gone without our doing; nobody else would. */
export function keepClusterRunning(
  cluster: StartedCluster,
  options: ClusterOptions & { readonly onTrouble: (words: string) => void },
): { stop(): Promise<void> } {
  let work: Promise<void> | null = null;
  const look = async () => {
    if (serverRuns(path.join(cluster.folder, 'data'))) return;
    options.onTrouble('PostgreSQL is gone; starting it again');
    const { port } = await startCluster(options);
    if (port !== cluster.port) options.onTrouble(`Port ${cluster.port} was taken meanwhile: start Muslin anew`);
  };
  const timer = setInterval(() => {
    work ??= look()
      .catch((error: unknown) => options.onTrouble(error instanceof Error ? error.message : String(error)))
      .finally(() => {
        work = null;
      });
  }, WATCH_EVERY_MS);
  return {
    stop: async () => {
      clearInterval(timer);
      await work;
    },
  };
}
