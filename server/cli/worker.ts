import { jsonLinesLog } from '../log.ts';
import { createFolderStore } from '../storage/folder-store.ts';
import { shippedRelief } from '../tiles/relief.ts';
import { startWorker } from '../worker.ts';
import type { Command } from './command.ts';
import { untilAborted } from './until-aborted.ts';
import { readWorkerSettings } from './worker-settings.ts';

/** The hidden command `worker`: reads weather files and judges years until it is asked to stop. */
export const run: Command = async ({ signal }) => {
  const { databaseUrl, originalsDir } = readWorkerSettings(process.env);
  const log = jsonLinesLog(
    (line) => void process.stderr.write(line),
    () => new Date(),
  );
  const worker = await startWorker({
    databaseUrl,
    storage: createFolderStore(originalsDir),
    relief: shippedRelief(),
    log,
  });
  await untilAborted(signal);
  await worker.close();
  return 0;
};
