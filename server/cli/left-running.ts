import { readdirSync, readFileSync } from 'node:fs';
import { setTimeout as sleep } from 'node:timers/promises';

const GRACE_MS = 5_000;
const LOOK_MS = 250;

export interface LeftProcess {
  readonly pid: number;
  readonly command: string;
}

function readQuietly(file: string): string {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    return '';
  }
}

/** Processes, other than this one, that carry the folder in their command line or environment. */
export function processesOf(folder: string): LeftProcess[] {
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name) && Number(name) !== process.pid)
    .map((name) => ({ pid: Number(name), words: readQuietly(`/proc/${name}/cmdline`) }))
    .filter(({ pid, words }) => words !== '' && (words + readQuietly(`/proc/${pid}/environ`)).includes(folder))
    .map(({ pid, words }) => ({ pid, command: words.replaceAll('\0', ' ').trim().slice(0, 200) }));
}

/** Waits a moment for the processes of a folder to end, ends those that stay, and answers which they were. */
export async function endLeftProcesses(folder: string): Promise<LeftProcess[]> {
  const until = Date.now() + GRACE_MS;
  while (processesOf(folder).length > 0 && Date.now() < until) await sleep(LOOK_MS);
  const left = processesOf(folder);
  for (const { pid } of left) {
    try {
      process.kill(pid, 'SIGKILL');
    } catch {
      // it has just ended
    }
  }
  return left;
}
