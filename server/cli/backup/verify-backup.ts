import { knownMigrations } from '../../db/prepare-database.ts';
import { DamagedArchive, type ReadArchive, readZip } from '../../storage/read-zip.ts';
import { CouldNotRun } from '../could-not-run.ts';
import { DUMP_ENTRY, fingerprintOfKey, keyOfEntry, MANIFEST_ENTRY, Manifest } from './manifest.ts';
import { makeProgress } from './progress.ts';

interface Looking {
  readonly signal: AbortSignal;
  readonly say: (words: string) => void;
}

/**
 * Reads all of an archive and compares it with its manifest.
 * @throws DamagedArchive that names the first entry that is not as it should be
 */
export async function verifyBackup(file: string, looking: Looking): Promise<Manifest> {
  const archive = await readZip(file);
  try {
    const manifest = await readManifest(archive);
    await compareEntries(archive, manifest, looking);
    return manifest;
  } finally {
    archive.close();
  }
}

async function readManifest(archive: ReadArchive): Promise<Manifest> {
  const text = await archive.text(MANIFEST_ENTRY);
  const read = Manifest.safeParse(jsonOf(text));
  if (read.success) return read.data;
  const format = formatOf(text);
  if (format !== null) throw new CouldNotRun(`It was made by another release (format ${format}). Use that release.`);
  throw new DamagedArchive(`${MANIFEST_ENTRY} does not say what it should.`);
}

async function compareEntries(archive: ReadArchive, manifest: Manifest, { signal, say }: Looking): Promise<void> {
  const wanted = Object.entries(manifest.entries);
  const held = new Set(archive.entries);
  const stray = archive.entries.find((entry) => entry !== MANIFEST_ENTRY && !Object.hasOwn(manifest.entries, entry));
  // An original that was damaged in the store is named as missing, and its bytes may lie there all the same.
  const isNamed = stray === undefined || manifest.missing.includes(keyOfEntry(stray) ?? '');
  if (!isNamed) throw new DamagedArchive(`${stray} is in the archive, and its manifest does not know it.`);
  if (!Object.hasOwn(manifest.entries, DUMP_ENTRY)) throw new DamagedArchive(`${DUMP_ENTRY} is missing.`);
  const progress = makeProgress(say);
  for (const [index, [entry, { bytes, fingerprint }]] of wanted.entries()) {
    progress(`Checked: ${index} of ${wanted.length}.`);
    if (!held.has(entry)) throw new DamagedArchive(`${entry} is missing.`);
    const key = keyOfEntry(entry);
    if (key !== null && fingerprintOfKey(key) !== fingerprint) throw new DamagedArchive(`${entry} has the wrong name.`);
    const found = await archive.measure(entry, signal);
    if (found.bytes !== bytes || found.fingerprint !== fingerprint)
      throw new DamagedArchive(`${entry} is not what the manifest says: another fingerprint.`);
  }
}

/** @throws CouldNotRun when the archive's database has migrations that this release does not know */
export async function refuseNewer({ migrations }: Manifest): Promise<void> {
  const known = new Set(await knownMigrations());
  const newer = migrations.filter((name) => !known.has(name));
  if (newer.length === 0) return;
  throw new CouldNotRun(
    `The backup was made by a newer release: this one does not know ${newer.join(', ')}. Upgrade Muslin first, then restore.`,
  );
}

function jsonOf(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}

/** The format that a manifest of another release names. */
function formatOf(text: string): number | null {
  const read = jsonOf(text);
  if (typeof read !== 'object' || read === null || !('format' in read)) return null;
  return typeof read.format === 'number' ? read.format : null;
}
