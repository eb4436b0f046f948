import { type Config, ConfigError, readConfig } from '../config.ts';
import { jsonLinesLog } from '../log.ts';
import { smtpMailer } from '../mail/mailer.ts';
import { openStore } from '../storage/open-store.ts';
import { shippedRelief } from '../tiles/relief.ts';
import { startWorker } from '../worker.ts';
import type { Command } from './command.ts';
import { CouldNotRun } from './could-not-run.ts';
import { untilAborted } from './until-aborted.ts';
import { readWorkerSettings } from './worker-settings.ts';

/** Where a server that nobody has configured listens. */
const HERE = 'http://localhost:3000';

/** `npm run worker`: one more process that reads weather files, judges years and sends mails until it is asked to stop. */
export const run: Command = async ({ rootDir, callerDir, signal }) => {
  const settings = readWorkerSettings({ rootDir, callerDir, env: process.env });
  const log = jsonLinesLog(
    (line) => void process.stderr.write(line),
    () => new Date(),
  );
  const { databaseUrl, originalsDir } = settings;
  const { objectStore, smtp, publicUrl } = environment();
  const storage = await openStore({ objectStore, originalsDir });
  const mailer = smtp === null ? null : smtpMailer(smtp);
  const worker = await startWorker({
    databaseUrl,
    storage,
    relief: shippedRelief(),
    log,
    mailer,
    publicUrl: settings.publicUrl ?? publicUrl ?? HERE,
  });
  await untilAborted(signal);
  await worker.close();
  return 0;
};

function environment(): Config {
  try {
    return readConfig(process.env);
  } catch (error) {
    if (error instanceof ConfigError) throw new CouldNotRun(error.message);
    throw error;
  }
}
