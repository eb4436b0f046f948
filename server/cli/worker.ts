import { ConfigError, readConfig } from '../config.ts';
import { jsonLinesLog } from '../log.ts';
import { openStore } from '../storage/open-store.ts';
import { shippedRelief } from '../tiles/relief.ts';
import { startWorker } from '../worker.ts';
import type { Command } from './command.ts';
import { CouldNotRun } from './could-not-run.ts';
import { untilAborted } from './until-aborted.ts';
import { readWorkerSettings } from './worker-settings.ts';

/** `npm run worker`: one more process that reads weather files and judges years until it is asked to stop. */
export const run: Command = async ({ rootDir, callerDir, signal }) => {
  const { databaseUrl, originalsDir } = readWorkerSettings({ rootDir, callerDir, env: process.env });
  const log = jsonLinesLog(
    (line) => void process.stderr.write(line),
    () => new Date(),
  );
  const storage = await openStore({ objectStore: objectStore(), originalsDir });
  const worker = await startWorker({ databaseUrl, storage, relief: shippedRelief(), log });
  await untilAborted(signal);
  await worker.close();
  return 0;
};

function objectStore() {
  try {
    return readConfig(process.env).objectStore;
  } catch (error) {
    if (error instanceof ConfigError) throw new CouldNotRun(error.message);
    throw error;
  }
}
