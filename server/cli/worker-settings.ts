import * as z from 'zod/mini';
import { CouldNotRun } from './could-not-run.ts';

/** What the start program tells a worker, as JSON in the environment variable MUSLIN_WORKER. */
const WorkerSettings = z.strictObject({ databaseUrl: z.string(), originalsDir: z.string() });
export type WorkerSettings = z.infer<typeof WorkerSettings>;

const VARIABLE = 'MUSLIN_WORKER';

export function workerEnvironment(settings: WorkerSettings): Record<string, string> {
  return { [VARIABLE]: JSON.stringify(settings) };
}

/** @throws CouldNotRun when nobody has told this process what to work on */
export function readWorkerSettings(env: NodeJS.ProcessEnv): WorkerSettings {
  try {
    return z.parse(WorkerSettings, JSON.parse(env[VARIABLE] ?? ''));
  } catch {
    throw new CouldNotRun('The worker is started by npm start alone.');
  }
}
