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

/** Takes a lock that a dead process left out of the way; false when someone else has taken its place meanwhile. */
function removeStale(lockFile: string, staleText: string): boolean {
  const aside = `${lockFile}.${process.pid}.stale`;
  try {
    renameSync(lockFile, aside);
    const same = readText(aside) === staleText;
    if (!same) linkSync(aside, lockFile);
    rmSync(aside, { force: true });
    return same;
  } catch {
    return false;
  }
}

/**
 * Takes a home for this process; the answer gives it back.
 * @throws CouldNotRun that says where the other one runs.
 */
export function takeHome({ dir, lockFile, address }: { dir: string; lockFile: string; address: string }): () => void {
  const own = JSON.stringify({ pid: process.pid, began: beganAt(process.pid) ?? '', address } satisfies Holder);
  const prepared = `${lockFile}.${process.pid}`;
  writeFileSync(prepared, own, { mode: 0o600 });
  try {
    for (;;) {
      const found = readText(lockFile);
      if (found !== null) {
        const holder = holderOf(found);
        if (holder !== null) throw busy(dir, holder);
        removeStale(lockFile, found);
        continue;
      }
      try {
        linkSync(prepared, lockFile); // fails if someone was faster
        break;
      } catch {
        // look again who it is
      }
    }
  } finally {
    rmSync(prepared, { force: true });
  }
  return () => {
    if (readText(lockFile) === own) rmSync(lockFile, { force: true });
  };
}
