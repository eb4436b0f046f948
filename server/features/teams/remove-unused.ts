import type { Knex } from 'knex';
import type { OriginalStore } from '../../storage/original-store.ts';
import { isKeyUsed } from './stored-keys-read-model.ts';

/** Takes an original out of the store unless a row names it: another team may have brought the same bytes. */
export async function removeUnused({ db, storage }: { db: Knex; storage: OriginalStore }, key: string): Promise<void> {
  if (await isKeyUsed(db, key)) return;
  const bytes = await storage.read(key).catch(() => null);
  if (bytes === null) return;
  await storage.remove(key);
  // Somebody may have brought the same bytes between the look and the removal.
  if (await isKeyUsed(db, key)) await storage.put(key, bytes);
}
