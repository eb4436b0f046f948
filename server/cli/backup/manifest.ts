import { createHash } from 'node:crypto';
import * as z from 'zod/mini';

/** Raised when an archive of this release cannot be read by the one before. */
export const BACKUP_FORMAT = 1;

export const MANIFEST_ENTRY = 'manifest.json';
export const DUMP_ENTRY = 'database.dump';
const ORIGINALS = 'originals/';

const Fingerprint = z.string().check(z.regex(/^[0-9a-f]{64}$/));
const Entry = z.object({ bytes: z.int(), fingerprint: Fingerprint });

/** What stands in an archive, so that whoever opens it can tell that all of it is there and as it was. */
export const Manifest = z.object({
  format: z.literal(BACKUP_FORMAT),
  madeAt: z.iso.datetime(),
  migrations: z.array(z.string()),
  /** Rows and checksum by table: what the database must say once it is restored. */
  tables: z.record(z.string(), z.object({ rows: z.int(), checksum: z.string() })),
  /** Tells whether a home has the secrets under which second factors were sealed; says nothing of them. */
  secretsMark: z.string(),
  /** Size and SHA-256 by entry of the archive: the dump and every original. */
  entries: z.record(z.string(), Entry),
  /** Keys of originals that the store had lost when the backup was made. */
  missing: z.array(z.string()),
});
export type Manifest = z.infer<typeof Manifest>;

export function entryOfOriginal(key: string): string {
  return `${ORIGINALS}${key}`;
}

/** The key of the original that an entry holds; null for another entry. */
export function keyOfEntry(entry: string): string | null {
  return entry.startsWith(ORIGINALS) ? entry.slice(ORIGINALS.length) : null;
}

/** An original's key ends with the fingerprint of its bytes. */
export function fingerprintOfKey(key: string): string {
  return key.slice(key.lastIndexOf('/') + 1);
}

/** The secrets are 256 random bits each, so that nobody can guess them from this. */
export function secretsMarkOf(secret: string): string {
  return createHash('sha256').update(`muslin backup ${secret}`).digest('hex').slice(0, 16);
}
