import { ConfigError, readConfig } from '../../config.ts';
import { openStore } from '../../storage/open-store.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { CouldNotRun } from '../could-not-run.ts';
import type { Home } from '../home.ts';

/** The store of originals that `npm start` would use with this environment. */
export async function configuredStore({ originalsDir }: Home): Promise<OriginalStore> {
  try {
    return await openStore({ objectStore: readConfig(process.env).objectStore, originalsDir });
  } catch (error) {
    if (error instanceof ConfigError) throw new CouldNotRun(error.message);
    throw error;
  }
}
