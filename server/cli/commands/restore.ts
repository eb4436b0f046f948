import { existsSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { DamagedArchive } from '../../storage/read-zip.ts';
import { configuredStore } from '../backup/configured-store.ts';
import { type Manifest, secretsMarkOf } from '../backup/manifest.ts';
import { restoreBackup } from '../backup/restore-backup.ts';
import { refuseNewer, verifyBackup } from '../backup/verify-backup.ts';
import { SUPERUSER } from '../cluster.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { CouldNotRun } from '../could-not-run.ts';
import { type Home, homePath, openHome } from '../home.ts';
import { DATABASE, withStartedCluster } from '../home-database.ts';
import { requirePackages } from '../packages.ts';
import { WrongUse } from './command-arguments.ts';
import { printResult, say } from './print-result.ts';

/** `muslin restore FILE`: puts a backup into a home. Nothing of the home is touched before all of the archive has been read and checked. */
export async function restore(context: CommandContext): Promise<ExitCode> {
  const { file, over } = readRestoreArguments(context);
  const { signal } = context;
  if (!existsSync(file)) throw new CouldNotRun(`There is no file ${file}.`);
  const dir = homePath({ ...context, named: process.env.MUSLIN_HOME ?? '' });
  if (existsSync(path.join(dir, 'pg-port')) && !over) {
    throw new CouldNotRun(
      `${dir} holds a database already. Name an empty MUSLIN_HOME, or put the backup in its place with --over: what is there is lost.`,
    );
  }
  try {
    say('Reading the archive, every byte of it.');
    const manifest = await verifyBackup(file, { signal, say });
    await refuseNewer(manifest);
    await requirePackages(['postgresql'], signal);
    const home = openHome(dir);
    await withStartedCluster(home, ({ port }) => restoreInto(home, { port, file, manifest, signal }));
    sumUp(home, { file, manifest });
    return 0;
  } catch (error) {
    if (!(error instanceof DamagedArchive)) throw error;
    say(`${file} is damaged and was not restored. ${error.message}`);
    return 1;
  }
}

async function restoreInto(
  home: Home,
  { port, file, manifest, signal }: { port: number; file: string; manifest: Manifest; signal: AbortSignal },
): Promise<void> {
  const { superuserPassword, ownerPassword, appPassword } = home.secrets;
  const superuser = { name: SUPERUSER, password: superuserPassword };
  const target = {
    server: { port, superuser, ownerPassword, appPassword },
    database: DATABASE,
    storage: await configuredStore(home),
    uploadsDir: home.uploadsDir,
  };
  await restoreBackup(target, { file, manifest, signal, say });
}

function sumUp(home: Home, { file, manifest }: { file: string; manifest: Manifest }): void {
  const { madeAt, missing, tables, entries } = manifest;
  const rows = Object.values(tables).reduce((sum, table) => sum + table.rows, 0);
  const originals = Object.keys(entries).length - 1;
  const sameSecrets = home.secrets.sessionSecrets.map(secretsMarkOf).includes(manifest.secretsMark);
  printResult({ home: home.dir, file, madeAt, rows, originals, missing, sameSecrets });
  say(`Restored what was there on ${madeAt}: ${rows} rows and ${originals} originals, each checked.`);
  if (missing.length > 0) say(`Originals that were missing when the backup was made: ${missing.join(', ')}.`);
  if (sameSecrets) return;
  say(
    `The secrets of ${home.dir} are not those of the backup: everybody signs in anew, and whoever has a second factor needs a recovery code. With the secrets.json of the old home in its place, put there before restoring, nothing of this is so.`,
  );
}

function readRestoreArguments({ args, callerDir }: CommandContext): { file: string; over: boolean } {
  try {
    const options = { over: { type: 'boolean', default: false } } as const;
    const { positionals, values } = parseArgs({ args: [...args], options, allowPositionals: true });
    const [file, ...more] = positionals;
    if (file !== undefined && file !== '' && more.length === 0)
      return { file: path.resolve(callerDir, file), over: values.over };
  } catch (error) {
    throw new WrongUse(error instanceof Error ? error.message : String(error));
  }
  throw new WrongUse('Name the one archive to restore: muslin restore FILE.');
}
