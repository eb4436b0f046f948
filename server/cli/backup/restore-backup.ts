import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { rm } from 'node:fs/promises';
import path from 'node:path';
import { readTableSums, type TableSum } from '../../db/database-snapshot.ts';
import { type DatabaseServer, prepareDatabase } from '../../db/prepare-database.ts';
import { dropDatabase, makeEmptyDatabase, takeName } from '../../db/restored-database.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { DamagedArchive, type ReadArchive, readZip } from '../../storage/read-zip.ts';
import { CouldNotRun } from '../could-not-run.ts';
import { fillDatabase } from './database-programs.ts';
import { DUMP_ENTRY, fingerprintOfKey, keyOfEntry, type Manifest } from './manifest.ts';
import { makeProgress } from './progress.ts';

export interface RestoreTarget {
  readonly server: DatabaseServer;
  readonly database: string;
  readonly storage: OriginalStore;
  /** Where an original waits on its way from the archive into the store. */
  readonly uploadsDir: string;
}

interface Restoring {
  readonly file: string;
  readonly manifest: Manifest;
  readonly signal: AbortSignal;
  readonly say: (words: string) => void;
}

/**
 * Puts back what an archive holds; it has been verified. The database is filled beside the one in use and takes its name only when every
 * table says what the manifest says: whatever fails before, what was there stays.
 */
export async function restoreBackup(target: RestoreTarget, restoring: Restoring): Promise<void> {
  const { server, database } = target;
  const archive = await readZip(restoring.file);
  const beside = `${database}_restored`;
  try {
    await restoreOriginals(target, { archive, ...restoring });
    restoring.say('Database: reading it in.');
    const ownerUrl = await makeEmptyDatabase(server, beside);
    await fillDatabase(ownerUrl, { dump: await archive.open(DUMP_ENTRY), signal: restoring.signal });
    compareTables(restoring.manifest.tables, await readTableSums(ownerUrl));
    await takeName(server, { from: beside, to: database });
    // Brings a database of an older release up to this one, and the job queue's rights with it.
    await prepareDatabase(server, database);
  } finally {
    archive.close();
    await dropDatabase(server, beside);
  }
}

async function restoreOriginals(
  { storage, uploadsDir }: RestoreTarget,
  { archive, manifest, signal, say }: Restoring & { archive: ReadArchive },
): Promise<void> {
  const keys = Object.keys(manifest.entries).flatMap((entry) => {
    const key = keyOfEntry(entry);
    return key === null ? [] : [{ entry, key }];
  });
  const progress = makeProgress(say);
  const waiting = path.join(uploadsDir, `restore-${process.pid}`);
  try {
    for (const [index, { entry, key }] of keys.entries()) {
      progress(`Originals: ${index} of ${keys.length}.`);
      await archive.measure(entry, signal, createWriteStream(waiting, { mode: 0o600 }));
      await putVerified(storage, { key, from: waiting, signal });
    }
  } finally {
    await rm(waiting, { force: true });
  }
}

/** What stands under the key already is looked at too: it may be what was damaged. */
async function putVerified(
  storage: OriginalStore,
  { key, from, signal }: { key: string; from: string; signal: AbortSignal },
): Promise<void> {
  for (const mayTryAgain of [true, false]) {
    await storage.put(key, from);
    if (await holds(storage, key, signal)) return;
    if (mayTryAgain) await storage.remove(key);
  }
  throw new CouldNotRun(`The store of originals does not give back what it was given: ${key}.`);
}

async function holds(storage: OriginalStore, key: string, signal: AbortSignal): Promise<boolean> {
  const hash = createHash('sha256');
  for await (const chunk of await storage.get(key)) {
    signal.throwIfAborted();
    hash.update(chunk);
  }
  return hash.digest('hex') === fingerprintOfKey(key);
}

function compareTables(wanted: Readonly<Record<string, TableSum>>, found: Readonly<Record<string, TableSum>>): void {
  const names = [...new Set([...Object.keys(wanted), ...Object.keys(found)])];
  const differing = names.filter(
    (name) => wanted[name]?.rows !== found[name]?.rows || wanted[name]?.checksum !== found[name]?.checksum,
  );
  if (differing.length === 0) return;
  throw new DamagedArchive(
    `The database is not what the manifest says: ${differing.join(', ')}. Nothing was replaced.`,
  );
}
