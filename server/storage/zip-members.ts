/**
 * The files of a zip archive, one after another, each streamed to the disk and hashed on the way. What an archive says of itself is
 * checked before anything is taken out; what it holds is stopped at the first byte beyond.
 */
import { createHash, randomUUID } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { open, rm } from 'node:fs/promises';
import path from 'node:path';
import { Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import yauzl, { type Entry, type ZipFile } from 'yauzl';

export const MEMBER_BYTES = 64 * 1024 * 1024;
export const ARCHIVE_BYTES = 4 * 1024 * 1024 * 1024;
export const MOST_MEMBERS = 2000;
/** An archive that shrinks its content further than this is made to fill a disk. */
export const MOST_RATIO = 200;
/** Small members shrink further without harm: a file of one repeated line. */
const RATIO_FROM_BYTES = 1024 * 1024;

/** A file that was taken out; it is removed when the next one is asked for. */
export interface ZipMember {
  readonly kind: 'member';
  /** Which of the archive's own entries it is or stands in, counted from 0. */
  readonly entry: number;
  /** Its path in the archive, for messages; never a place on our disk. */
  readonly path: string;
  readonly bytes: number;
  /** SHA-256, hexadecimal. */
  readonly fingerprint: string;
  readonly temporaryPath: string;
}
/** A file that was not taken out, and why. */
export interface LeftOutMember {
  readonly kind: 'left out';
  readonly entry: number;
  readonly path: string;
  readonly why: string;
}

/** The archive cannot be used at all: what is wrong with it, in a sentence. */
export class ZipProblem extends Error {}

interface Opening {
  /** The archive on our disk, and where its files are laid meanwhile. */
  readonly file: string;
  readonly folder: string;
  /** Why a file of this name is not wanted; null when it is. */
  readonly unwanted: (memberPath: string) => string | null;
  /** The first entry that is asked for, counted from 0; those before it are not touched. */
  readonly from?: number;
  readonly signal?: AbortSignal;
}

/** How many files the archive lists. @throws ZipProblem */
export async function countZipMembers(file: string): Promise<number> {
  const zip = await openZip(file);
  zip.close();
  return zip.entryCount;
}

/**
 * Takes the files out one by one; an archive inside the archive is opened too, one inside that is not.
 * @throws ZipProblem when the archive is damaged or too large, before anything is taken out
 */
export async function* zipMembers(opening: Opening): AsyncGenerator<ZipMember | LeftOutMember> {
  yield* membersOf(opening, null);
}

/** @param outer the entry of the archive that this one stands in; null for the archive itself */
async function* membersOf(
  opening: Opening,
  outer: { path: string; entry: number } | null,
): AsyncGenerator<ZipMember | LeftOutMember> {
  const zip = await openZip(opening.file);
  try {
    for (const [index, { entry, name }] of (await listEntries(zip)).entries()) {
      if (name.endsWith('/') || (outer === null && index < (opening.from ?? 0))) continue;
      const place = { entry: outer?.entry ?? index, path: outer === null ? name : `${outer.path}/${name}` };
      const why = entryProblem(entry) ?? opening.unwanted(place.path);
      if (why === null) yield* takeOut({ zip, entry, place, nested: outer !== null }, opening);
      else yield { kind: 'left out', ...place, why };
    }
  } finally {
    zip.close();
  }
}

async function openZip(file: string): Promise<ZipFile> {
  try {
    // Names are decoded here, so that one strange name does not make the whole archive unreadable.
    return await yauzl.openPromise(file, { lazyEntries: true, autoClose: false, decodeStrings: false });
  } catch (error) {
    throw new ZipProblem(
      `This is not a whole zip archive (${reasonOf(error)}). Pack it again, or bring it anew from its source.`,
    );
  }
}

interface Listed {
  readonly entry: Entry;
  readonly name: string;
}

async function listEntries(zip: ZipFile): Promise<readonly Listed[]> {
  if (zip.entryCount > MOST_MEMBERS) {
    throw new ZipProblem(
      `The archive holds ${zip.entryCount} files; at most ${MOST_MEMBERS} are taken at once. Split it into smaller ones.`,
    );
  }
  const listed: Listed[] = [];
  let total = 0;
  try {
    for await (const entry of zip.eachEntry()) {
      listed.push({ entry, name: nameOf(entry) });
      total += entry.uncompressedSize;
    }
  } catch (error) {
    throw new ZipProblem(`The list of files in the archive is damaged (${reasonOf(error)}). Pack it again.`);
  }
  if (total > ARCHIVE_BYTES) {
    throw new ZipProblem('The archive unpacks to more than 4 GB, the most that is taken at once. Split it.');
  }
  return listed;
}

function nameOf({ generalPurposeBitFlag, fileNameRaw, extraFields }: Entry): string {
  const name = yauzl.getFileNameLowLevel(generalPurposeBitFlag, fileNameRaw, extraFields, false);
  return name.replaceAll('\\', '/').slice(-500);
}

function entryProblem(entry: Entry): string | null {
  const { compressedSize, uncompressedSize } = entry;
  if (entry.isEncrypted()) return 'It is locked with a password.';
  if (!entry.canDecodeFileData())
    return 'It is packed by a method that is not read; pack it with ordinary compression.';
  if (uncompressedSize > MEMBER_BYTES) return 'It is larger than 64 MB, the most that one file may have.';
  if (uncompressedSize > RATIO_FROM_BYTES && uncompressedSize > MOST_RATIO * compressedSize) {
    return `It would grow to more than ${MOST_RATIO} times its packed size, as no weather file does.`;
  }
  return null;
}

interface Place {
  readonly entry: number;
  readonly path: string;
}

async function* takeOut(
  { zip, entry, place, nested }: { zip: ZipFile; entry: Entry; place: Place; nested: boolean },
  opening: Opening,
): AsyncGenerator<ZipMember | LeftOutMember> {
  const temporaryPath = path.join(opening.folder, `member-${randomUUID()}`);
  try {
    const taken = await extract({ zip, entry, temporaryPath }, opening.signal);
    if (typeof taken === 'string') yield { kind: 'left out', ...place, why: taken };
    else if (!(await isZip(temporaryPath))) yield { kind: 'member', ...place, temporaryPath, ...taken };
    else if (nested) yield { kind: 'left out', ...place, why: 'It is an archive inside an archive inside an archive.' };
    else yield* openInside({ temporaryPath, place }, opening);
  } finally {
    await rm(temporaryPath, { force: true });
  }
}

async function* openInside(
  { temporaryPath, place }: { temporaryPath: string; place: Place },
  opening: Opening,
): AsyncGenerator<ZipMember | LeftOutMember> {
  try {
    yield* membersOf({ ...opening, file: temporaryPath }, place);
  } catch (error) {
    if (!(error instanceof ZipProblem)) throw error;
    yield { kind: 'left out', ...place, why: error.message };
  }
}

/** @returns size and hash, or why the file could not be taken out */
async function extract(
  { zip, entry, temporaryPath }: { zip: ZipFile; entry: Entry; temporaryPath: string },
  signal: AbortSignal | undefined,
): Promise<{ bytes: number; fingerprint: string } | string> {
  const hash = createHash('sha256');
  let bytes = 0;
  const measure = new Transform({
    transform(chunk: Buffer, _encoding, next) {
      bytes += chunk.length;
      if (bytes > MEMBER_BYTES) return next(new RangeError('more than 64 MB came out'));
      hash.update(chunk);
      next(null, chunk);
    },
  });
  try {
    const source = await zip.openReadStreamPromise(entry);
    const target = createWriteStream(temporaryPath, { flags: 'wx', mode: 0o600 });
    await pipeline(source, measure, target, ...(signal === undefined ? [] : [{ signal }]));
    return { bytes, fingerprint: hash.digest('hex') };
  } catch (error) {
    if (signal?.aborted || isOurDisk(error)) throw error;
    return `It is damaged and could not be taken out (${reasonOf(error)}).`;
  }
}

/** A full disk is our fault and no property of the archive. */
function isOurDisk(error: unknown): boolean {
  return error instanceof Error && 'syscall' in error && error.syscall !== undefined;
}

export async function isZip(file: string): Promise<boolean> {
  const handle = await open(file, 'r');
  try {
    const { buffer, bytesRead } = await handle.read(Buffer.alloc(4), 0, 4, 0);
    return bytesRead === 4 && buffer.toString('latin1') === 'PK\u0003\u0004';
  } finally {
    await handle.close();
  }
}

function reasonOf(error: unknown): string {
  return (error instanceof Error ? error.message : String(error)).replace(/\.$/, '').slice(0, 200);
}
