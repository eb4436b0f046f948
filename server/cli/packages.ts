/** Debian's packages that Muslin runs on: found, installed as root, or named for someone who may install them. */
import { accessSync, constants, existsSync, mkdirSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { CouldNotRun } from './could-not-run.ts';
import { findPostgresPrograms } from './postgres-programs.ts';
import { runProgram } from './run-program.ts';

export const CHROMIUM = '/usr/bin/chromium';

const APT = '/usr/bin/apt-get';
const TRY_FOR_MS = 10 * 60_000;
const LOCK_PAUSE_MS = 5_000;
/** Where Debian's PostgreSQL asks whether to make and start a cluster of its own at installation. */
const CLUSTER_SETTINGS = '/etc/postgresql-common/createcluster.d';

export type PackageName = 'postgresql' | 'chromium';

function isExecutable(file: string): boolean {
  try {
    accessSync(file, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

const isThere: Readonly<Record<PackageName, () => boolean>> = {
  postgresql: () => findPostgresPrograms() !== null,
  chromium: () => isExecutable(CHROMIUM),
};

function missingOf(names: readonly PackageName[]): PackageName[] {
  return names.filter((name) => !isThere[name]());
}

/** Debian's package would otherwise make a cluster "main" and start it at every boot of the machine. */
function declineMainCluster(): void {
  mkdirSync(CLUSTER_SETTINGS, { recursive: true });
  writeFileSync(path.join(CLUSTER_SETTINGS, 'muslin.conf'), 'create_main_cluster = false\n');
}

async function apt(args: readonly string[]): Promise<string | null> {
  const env = {
    PATH: process.env.PATH ?? '/usr/sbin:/usr/bin:/sbin:/bin',
    DEBIAN_FRONTEND: 'noninteractive',
    LC_ALL: 'C.UTF-8',
  };
  const outcome = await runProgram({ program: APT, args: ['-o', 'DPkg::Lock::Timeout=600', '-qq', ...args], env });
  return outcome.code === 0 ? null : outcome.output;
}

/**
 * The lock timeout of apt covers installing, not the lists that `update` fetches, and somebody else on this machine may be
 * installing the same: so it is asked again and again whether the program is there now.
 */
async function install(names: readonly PackageName[], signal: AbortSignal): Promise<void> {
  const until = Date.now() + TRY_FOR_MS;
  for (;;) {
    const missing = missingOf(names);
    if (missing.length === 0) return;
    const fault = (await apt(['update'])) ?? (await apt(['install', '-y', '--no-install-recommends', ...missing]));
    signal.throwIfAborted();
    if (fault !== null) {
      if (!fault.includes('Could not get lock') || Date.now() > until) {
        throw new CouldNotRun(`Debian's package manager could not install ${missing.join(' and ')}:\n${fault.trim()}`);
      }
      await sleep(LOCK_PAUSE_MS, undefined, { signal });
    } else if (missingOf(missing).length > 0) {
      throw new CouldNotRun(`${missing.join(' and ')} was installed, but its programs are not where Debian puts them.`);
    }
  }
}

/**
 * Sees to it that the packages are there: as root they are installed; anyone else is told the one command, before anything
 * has been started.
 * @throws CouldNotRun
 */
export async function requirePackages(names: readonly PackageName[], signal: AbortSignal): Promise<void> {
  const missing = missingOf(names);
  if (missing.length === 0) return;
  const command = `apt-get install ${missing.join(' ')}`;
  if (!existsSync(APT)) {
    throw new CouldNotRun(
      `Missing: ${missing.join(', ')}. This machine has no apt-get; install it the way your system does.`,
    );
  }
  if (process.getuid?.() !== 0) throw new CouldNotRun(`Missing: ${missing.join(', ')}. Install with: sudo ${command}`);
  process.stderr.write(`Installing Debian packages: ${missing.join(', ')}.\n`);
  if (missing.includes('postgresql')) declineMainCluster();
  await install(missing, signal);
}
