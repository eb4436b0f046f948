import { existsSync } from 'node:fs';
import path from 'node:path';
import { parseArgs } from 'node:util';
import { databaseUrl, OWNER_LOGIN } from '../../db/prepare-database.ts';
import { configuredStore } from '../backup/configured-store.ts';
import { sizeWords } from '../backup/progress.ts';
import { writeBackup } from '../backup/write-backup.ts';
import type { CommandContext, ExitCode } from '../command.ts';
import { CouldNotRun } from '../could-not-run.ts';
import { DATABASE, withHomeCluster } from '../home-database.ts';
import { WrongUse } from './command-arguments.ts';
import { printResult, say } from './print-result.ts';

/** `muslin backup FILE`: database and originals of a home as one archive, while the product runs or not. */
export async function backup(context: CommandContext): Promise<ExitCode> {
  const file = path.resolve(context.callerDir, readFileName(context.args));
  if (existsSync(file))
    throw new CouldNotRun(`${file} is there already. A backup replaces no file: give another name.`);
  if (!existsSync(path.dirname(file))) throw new CouldNotRun(`There is no folder ${path.dirname(file)}.`);
  const manifest = await withHomeCluster(context, async ({ home, port }) => {
    const login = { name: OWNER_LOGIN, password: home.secrets.ownerPassword };
    const source = {
      ownerUrl: databaseUrl({ login, port, database: DATABASE }),
      storage: await configuredStore(home),
      sessionSecrets: home.secrets.sessionSecrets,
    };
    return await writeBackup(source, { file, now: new Date(), signal: context.signal, say });
  });
  const { missing, entries, madeAt } = manifest;
  const bytes = Object.values(entries).reduce((sum, entry) => sum + entry.bytes, 0);
  const rows = Object.values(manifest.tables).reduce((sum, table) => sum + table.rows, 0);
  const originals = Object.keys(entries).length - 1;
  printResult({ file, madeAt, rows, originals, bytes, missing });
  say(
    `Done: ${rows} rows and ${originals} originals, ${sizeWords(bytes)}. Keep secrets.json of the home in another place.`,
  );
  if (missing.length === 0) return 0;
  say(`${missing.length} originals are missing or damaged in the store and could not be taken: ${missing.join(', ')}.`);
  return 1;
}

function readFileName(args: readonly string[]): string {
  try {
    const { positionals } = parseArgs({ args: [...args], options: {}, allowPositionals: true });
    const [file, ...more] = positionals;
    if (file !== undefined && file !== '' && more.length === 0) return file;
  } catch (error) {
    throw new WrongUse(error instanceof Error ? error.message : String(error));
  }
  throw new WrongUse('Name the one file to write: muslin backup FILE.');
}
