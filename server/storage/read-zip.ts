/** An archive that we wrote ourselves, entry by entry in any order. For archives that people bring see `zip-members.ts`. */
import { createHash } from 'node:crypto';
import { Readable, Writable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { crc32 } from 'node:zlib';
import yauzl, { type Entry, type ZipFile } from 'yauzl';
import type { WrittenEntry } from './write-zip.ts';

/** What is wrong with an archive, in a sentence that says where. */
export class DamagedArchive extends Error {
  override readonly name = 'DamagedArchive';
}

export interface ReadArchive {
  readonly entries: readonly string[];
  open(entry: string): Promise<Readable>;
  /** The whole of a small entry, its checksum in the archive looked at. @throws DamagedArchive */
  text(entry: string): Promise<string>;
  /** Size and fingerprint of an entry's content, which goes to `target` on the way. @throws DamagedArchive */
  measure(entry: string, signal: AbortSignal, target?: Writable): Promise<WrittenEntry>;
  close(): void;
}

/** @throws DamagedArchive when it is no archive, or not a whole one */
export async function readZip(file: string): Promise<ReadArchive> {
  const { zip, listed } = await list(file);
  const open = async (entry: string): Promise<Readable> => {
    const found = listed.get(entry);
    if (found === undefined) throw new DamagedArchive(`${entry} is missing.`);
    return await zip.openReadStreamPromise(found);
  };
  return {
    entries: [...listed.keys()],
    open,
    async text(entry) {
      const chunks: Buffer[] = [];
      for await (const chunk of await whole(open(entry), entry)) chunks.push(chunk);
      const bytes = Buffer.concat(chunks);
      if (crc32(bytes) !== listed.get(entry)?.crc32) throw new DamagedArchive(`${entry} is damaged.`);
      return bytes.toString('utf8');
    },
    async measure(entry, signal, target = nowhere()) {
      const hash = createHash('sha256');
      let bytes = 0;
      const source = await whole(open(entry), entry);
      const measured = async function* (chunks: AsyncIterable<Buffer>) {
        for await (const chunk of chunks) {
          bytes += chunk.length;
          hash.update(chunk);
          yield chunk;
        }
      };
      await pipeline(source, measured, target, { signal });
      return { bytes, fingerprint: hash.digest('hex') };
    },
    close: () => zip.close(),
  };
}

async function list(file: string): Promise<{ zip: ZipFile; listed: ReadonlyMap<string, Entry> }> {
  try {
    const zip = await yauzl.openPromise(file, { lazyEntries: true, autoClose: false });
    const listed = new Map<string, Entry>();
    for await (const entry of zip.eachEntry()) listed.set(entry.fileName, entry);
    return { zip, listed };
  } catch (error) {
    if (isOurDisk(error)) throw error;
    throw new DamagedArchive(`It is not a whole archive (${reasonOf(error)}).`);
  }
}

/** The chunks of an entry; what the unpacking says is told with the entry's name. */
async function whole(opening: Promise<Readable>, entry: string): Promise<Readable> {
  const chunks = async function* () {
    try {
      for await (const chunk of await opening) yield chunk;
    } catch (error) {
      if (error instanceof DamagedArchive || isOurDisk(error)) throw error;
      throw new DamagedArchive(`${entry} is damaged (${reasonOf(error)}).`);
    }
  };
  return Readable.from(chunks(), { objectMode: false });
}

function nowhere(): Writable {
  return new Writable({ write: (_chunk, _encoding, next) => next() });
}

/** A disk that fails, or a file that is not there, is no property of the archive. */
function isOurDisk(error: unknown): boolean {
  return error instanceof Error && 'syscall' in error && error.syscall !== undefined;
}

function reasonOf(error: unknown): string {
  return (error instanceof Error ? error.message : String(error)).replace(/\.$/, '').slice(0, 200);
}
