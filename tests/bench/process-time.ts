import { readdirSync, readFileSync } from 'node:fs';

const MS_PER_TICK = 10;

interface ProcessTimes {
  readonly parent: number;
  /** Processor time of the process itself, and of children of it that have ended, ms. */
  readonly ownMs: number;
  readonly endedMs: number;
}

function timesOf(pid: number): ProcessTimes | null {
  try {
    const text = readFileSync(`/proc/${pid}/stat`, 'utf8');
    // The name in brackets may hold anything; what follows it are numbers.
    const fields = text
      .slice(text.lastIndexOf(')') + 2)
      .split(' ')
      .map(Number);
    const [parent = 0, user = 0, system = 0, childUser = 0, childSystem = 0] = [1, 11, 12, 13, 14].map(
      (at) => fields[at],
    );
    return { parent, ownMs: MS_PER_TICK * (user + system), endedMs: MS_PER_TICK * (childUser + childSystem) };
  } catch {
    return null;
  }
}

/** Processor time that a process and its children have taken, ms; 0 when it is gone. */
export function familyMs(pid: number): number {
  const own = timesOf(pid);
  if (own === null) return 0;
  const others = readdirSync('/proc')
    .map(Number)
    .filter((other) => other > 0 && other !== pid);
  const children = others.map(timesOf).filter((times) => times?.parent === pid);
  return own.ownMs + own.endedMs + children.reduce((sum, times) => sum + (times?.ownMs ?? 0), 0);
}

/** The process that started another; 0 when that is gone. */
export function parentOf(pid: number): number {
  return timesOf(pid)?.parent ?? 0;
}
