import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import * as z from 'zod/mini';
import { CouldNotRun } from './could-not-run.ts';

const Holder = z.object({
  pid: z.int(),
  /** When that process began, in the kernel's own ticks: a number that is used again belongs to another process. */
  began: z.string(),
  address: z.string(),
});
type Holder = z.infer<typeof Holder>;

/** The kernel's start time of a process; null when there is no such process or it is dead and not yet collected. */
function beganAt(pid: number): string | null {
  try {
    const fields = readFileSync(`/proc/${pid}/stat`, 'utf8')
      .replace(/^.*\) /s, '')
      .split(' ');
    return fields[0] === 'Z' || fields[0] === 'X' ? null : (fields[19] ?? null);
  } catch {
    return null;
  }
}

function readText(file: string): string | null {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return null;
  }
}

function holderOf(text: string): Holder | null {
  try {
    const holder = z.parse(Holder, JSON.parse(text));
    return beganAt(holder.pid) === holder.began ? holder : null;
  } catch {
    return null;
  }
}

function busy(homeDir: string, holder: Holder): CouldNotRun {
  return new CouldNotRun(
    `Muslin already runs on ${homeDir}: ${holder.address} (process ${holder.pid}). Stop it first, or start this one with another MUSLIN_HOME and PORT.`,
  );
}

/** Takes a lock that a dead process left out of the way, but puts back one that a living process has just taken in its place. */
function removeStale(lockFile: string, staleText: string): void {
  const aside = `${lockFile}.${process.pid}.stale`;
  try {
    renameSync(lockFile, aside);
    if (readText(aside) !== staleText) linkSync(aside, lockFile);
  } catch {
    // someone else was faster; the caller looks again
  } finally {
    rmSync(aside, { force: true });
  }
}

export interface HomeLock {
  /** Tells others the address once it is known. */
  nameAddress(address: string): void;
  giveBack(): void;
}

/**
 * Takes a home for this process.
 * @throws CouldNotRun that says where the other one runs
 */
export function takeHome({ dir, lockFile, address }: { dir: string; lockFile: string; address: string }): HomeLock {
  const prepared = `${lockFile}.${process.pid}`;
  const began = beganAt(process.pid) ?? '';
  const prepare = (own: string) => {
    writeFileSync(prepared, JSON.stringify({ pid: process.pid, began, address: own } satisfies Holder), {
      mode: 0o600,
    });
  };
  prepare(address);
  try {
    while (!tryLink(prepared, lockFile)) {
      const found = readText(lockFile);
      const holder = found === null ? null : holderOf(found);
      if (holder !== null) throw busy(dir, holder);
      if (found !== null) removeStale(lockFile, found);
    }
  } finally {
    rmSync(prepared, { force: true });
  }
  return {
    nameAddress: (known) => {
      prepare(known);
      renameSync(prepared, lockFile);
    },
    giveBack: () => {
      if (holderOf(readText(lockFile) ?? '')?.pid === process.pid) rmSync(lockFile, { force: true });
    },
  };
}

/** False when somebody has the name already. */
function tryLink(from: string, to: string): boolean {
  try {
    linkSync(from, to);
    return true;
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'EEXIST') return false;
    throw error;
  }
}
