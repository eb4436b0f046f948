import { type DatabaseSnapshot, withSnapshot } from '../../db/database-snapshot.ts';
import type { OriginalStore } from '../../storage/original-store.ts';
import { type WrittenEntry, writeZip, type ZipWriter } from '../../storage/write-zip.ts';
import { dumpDatabase } from './database-programs.ts';
import {
  BACKUP_FORMAT,
  DUMP_ENTRY,
  entryOfOriginal,
  fingerprintOfKey,
  MANIFEST_ENTRY,
  type Manifest,
  secretsMarkOf,
} from './manifest.ts';
import { makeProgress, sizeWords } from './progress.ts';
import { verifyBackup } from './verify-backup.ts';

export interface BackupSource {
  /** Address with the owner's login. */
  readonly ownerUrl: string;
  readonly storage: OriginalStore;
  readonly sessionSecrets: readonly [string, ...string[]];
}

interface Writing {
  readonly file: string;
  readonly now: Date;
  readonly signal: AbortSignal;
  readonly say: (words: string) => void;
}

/**
 * Writes database and originals into one archive while the product goes on. The database is taken first, at one moment; originals are
 * named after their bytes and never change, so those that its rows speak of can be read after it.
 */
export async function writeBackup(source: BackupSource, writing: Writing): Promise<Manifest> {
  const { file, signal, say } = writing;
  let manifest: Manifest | null = null;
  await writeZip(file, {
    signal,
    work: async (zip) => {
      manifest = await withSnapshot(source.ownerUrl, (snapshot) => writeAll({ source, snapshot, zip }, writing));
      await zip.add(MANIFEST_ENTRY, Buffer.from(`${JSON.stringify(manifest, null, 1)}\n`));
    },
    check: async (unfinished) => {
      say('Reading the archive again, every byte of it.');
      await verifyBackup(unfinished, { signal, say });
    },
  });
  if (manifest === null) throw new Error('An archive was written without its manifest.');
  return manifest;
}

interface Parts {
  readonly source: BackupSource;
  readonly snapshot: DatabaseSnapshot;
  readonly zip: ZipWriter;
}

async function writeAll(parts: Parts, writing: Writing): Promise<Manifest> {
  const { source, snapshot } = parts;
  const entries: Record<string, WrittenEntry> = { [DUMP_ENTRY]: await writeDump(parts, writing) };
  const missing: string[] = [];
  const progress = makeProgress(writing.say);
  for (const [index, key] of snapshot.originalKeys.entries()) {
    writing.signal.throwIfAborted();
    progress(`Originals: ${index} of ${snapshot.originalKeys.length}.`);
    const written = await writeOriginal(parts, key);
    if (written === null) missing.push(key);
    else entries[entryOfOriginal(key)] = written;
  }
  return {
    format: BACKUP_FORMAT,
    madeAt: writing.now.toISOString(),
    migrations: [...snapshot.migrations],
    tables: { ...snapshot.tables },
    secretsMark: secretsMarkOf(source.sessionSecrets[0]),
    entries,
    missing,
  };
}

async function writeDump({ source, snapshot, zip }: Parts, { signal, say }: Writing): Promise<WrittenEntry> {
  say('Database: writing it out.');
  const { dump, done } = dumpDatabase({ ownerUrl: source.ownerUrl, snapshotId: snapshot.id, signal });
  // Packed by pg_dump itself.
  const written = await zip.add(DUMP_ENTRY, dump, { packed: false });
  await done;
  say(`Database: ${sizeWords(written.bytes)}.`);
  return written;
}

/** @returns null for an original that is not there, or not as its key says: the backup of everything else is worth having */
async function writeOriginal({ source, zip }: Parts, key: string): Promise<WrittenEntry | null> {
  const content = await source.storage.get(key).catch((error: unknown) => {
    if (isMissing(error)) return null;
    throw error;
  });
  if (content === null) return null;
  const written = await zip.add(entryOfOriginal(key), content);
  return written.fingerprint === fingerprintOfKey(key) ? written : null;
}

const MISSING = new Set(['ENOENT', 'NoSuchKey', 'NotFound']);

function isMissing(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  return MISSING.has(error.name) || ('code' in error && MISSING.has(String(error.code)));
}
