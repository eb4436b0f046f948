import type { Knex } from 'knex';
import type { OriginalStore } from '../../storage/original-store.ts';
import { endExpiredExports } from './export-store.ts';
import { removeUnused } from './remove-unused.ts';

/** Exports whose time is over leave the store. */
export async function removeExpiredExports(deps: { db: Knex; storage: OriginalStore }, at: Date): Promise<void> {
  for (const key of await endExpiredExports(deps.db, at)) await removeUnused(deps, key);
}
