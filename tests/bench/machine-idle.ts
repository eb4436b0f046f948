import { readFileSync } from 'node:fs';

/** Processor time since the machine started, in ticks of 10 ms, and this process's own. */
export interface ProcessorCount {
  readonly total: number;
  readonly idle: number;
  readonly own: number;
}

const TICKS_PER_MICROSECOND = 1 / 10_000;

export function countProcessor(): ProcessorCount {
  const [line = ''] = readFileSync('/proc/stat', 'utf8').split('\n', 1);
  const ticks = line.trim().split(/\s+/).slice(1, 9).map(Number);
  const total = ticks.reduce((sum, value) => sum + value, 0);
  // The fourth is idle, the fifth waits for a disk.
  const idle = (ticks[3] ?? 0) + (ticks[4] ?? 0);
  const { user, system } = process.cpuUsage();
  return { total, idle, own: (user + system) * TICKS_PER_MICROSECOND };
}

/** Share, 0..1, of the processors that was idle between two counts, this process's own work set aside. */
export function idleShare(before: ProcessorCount, after: ProcessorCount): number {
  const left = after.total - before.total - (after.own - before.own);
  return left <= 0 ? 1 : Math.min(1, (after.idle - before.idle) / left);
}
