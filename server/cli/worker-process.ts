import { type ChildProcess, spawn } from 'node:child_process';
import path from 'node:path';
import type { Log } from '../log.ts';
import { type WorkerSettings, workerEnvironment } from './worker-settings.ts';

const FIRST_PAUSE_MS = 500;
const LONGEST_PAUSE_MS = 30_000;
/** A worker that lived this long was well: the next pause is short again. */
const WELL_AFTER_MS = 60_000;
const PATIENCE_MS = 30_000;

export interface WorkerProcess {
  /** Asks it to finish the jobs at hand and waits for its end. */
  stop(): Promise<void>;
}

/** Keeps one job worker running in a process of its own: one that dies is started again, ever more slowly. */
export function keepWorkerRunning(options: { rootDir: string; settings: WorkerSettings; log: Log }): WorkerProcess {
  let stopping = false;
  let child: ChildProcess | undefined;
  let pause: NodeJS.Timeout | undefined;
  let pauseMs = FIRST_PAUSE_MS;
  let ended: Promise<void> = Promise.resolve();

  const begin = () => {
    const began = Date.now();
    const started = spawn(process.execPath, [path.join(options.rootDir, 'server/cli/run.mjs'), 'worker'], {
      cwd: options.rootDir,
      env: { ...process.env, ...workerEnvironment(options.settings) },
      // A group of its own: a Ctrl-C in the terminal reaches us, and we ask it to end when the web has ended.
      detached: true,
      stdio: ['ignore', 'ignore', 'inherit'],
    });
    child = started;
    ended = new Promise((resolve) => {
      const end = (how: string) => {
        child = undefined;
        resolve();
        if (stopping) return;
        if (Date.now() - began > WELL_AFTER_MS) pauseMs = FIRST_PAUSE_MS;
        options.log.error({ how, pauseMs }, 'the job worker ended; starting it again');
        pause = setTimeout(begin, pauseMs);
        pauseMs = Math.min(pauseMs * 2, LONGEST_PAUSE_MS);
      };
      started.once('error', (error) => end(error.message));
      started.once('exit', (code, signal) => end(signal ?? `code ${code}`));
    });
  };
  begin();

  return {
    stop: async () => {
      stopping = true;
      clearTimeout(pause);
      const last = child;
      if (last === undefined) return;
      last.kill('SIGTERM');
      const insist = setTimeout(() => last.kill('SIGKILL'), PATIENCE_MS);
      await ended;
      clearTimeout(insist);
    },
  };
}
