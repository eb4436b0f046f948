import { existsSync, mkdirSync, realpathSync, statSync } from 'node:fs';
import path from 'node:path';
import { CouldNotRun } from './could-not-run.ts';
import { openSecrets, type Secrets } from './secrets.ts';

/** Everything that Muslin keeps: one folder, `MUSLIN_HOME`. */
export interface Home {
  /** Without symbolic links. */
  readonly dir: string;
  readonly secrets: Secrets;
  /** Store of the original files. */
  readonly originalsDir: string;
  /** Where uploads wait while they are read. */
  readonly uploadsDir: string;
  readonly demoAccountsFile: string;
  /** Says who runs here: see `home-lock.ts`. */
  readonly lockFile: string;
}

/** The folder that MUSLIN_HOME names, counted from where the caller stands; without it `.muslin` in the repository. */
export function homePath({ rootDir, callerDir, named }: { rootDir: string; callerDir: string; named: string }): string {
  return named === '' ? path.join(rootDir, '.muslin') : path.resolve(callerDir, named);
}

/** Opens a home, making what is missing of it. Nothing in it is readable by others. */
export function openHome(homeDir: string): Home {
  try {
    mkdirSync(homeDir, { recursive: true, mode: 0o700 });
    const dir = realpathSync(homeDir);
    if (!statSync(dir).isDirectory()) throw new CouldNotRun(`MUSLIN_HOME ${dir} is not a folder.`);
    const secretsFile = path.join(dir, 'secrets.json');
    if (!existsSync(secretsFile) && existsSync(path.join(dir, 'pg-port'))) {
      throw new CouldNotRun(
        `${secretsFile} is missing, and the database in ${dir} cannot be opened without its passwords. Put the file back, or start with another MUSLIN_HOME.`,
      );
    }
    const home: Home = {
      dir,
      secrets: openSecrets(secretsFile),
      originalsDir: path.join(dir, 'originals'),
      uploadsDir: path.join(dir, 'uploads'),
      demoAccountsFile: path.join(dir, 'demo-accounts.txt'),
      lockFile: path.join(dir, 'running.json'),
    };
    for (const folder of [home.originalsDir, home.uploadsDir]) mkdirSync(folder, { recursive: true, mode: 0o700 });
    return home;
  } catch (error) {
    if (error instanceof CouldNotRun || !(error instanceof Error)) throw error;
    throw new CouldNotRun(`MUSLIN_HOME ${homeDir} cannot be used: ${error.message}`);
  }
}
