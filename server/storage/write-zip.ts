/** A zip archive written as it is made: nothing of it is held in memory, and no file of its name is there before it is whole. */
import { createHash, randomUUID } from 'node:crypto';
import { createReadStream, createWriteStream } from 'node:fs';
import { open, rename, rm } from 'node:fs/promises';
import path from 'node:path';
import { Readable, Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import yazl from 'yazl';

export interface WrittenEntry {
  readonly bytes: number;
  /** SHA-256 of the content, hexadecimal. */
  readonly fingerprint: string;
}

export interface ZipWriter {
  /** Answers when all of the content has been taken in. @param options.packed false for what is packed already */
  add(entry: string, content: Readable | Uint8Array, options?: { packed?: boolean }): Promise<WrittenEntry>;
}

/**
 * Writes an archive beside its place and moves it there when it is whole and on the disk; whatever goes wrong, nothing stays.
 * @param options.check looks at the archive before it gets its name
 */
export async function writeZip(
  file: string,
  options: {
    readonly signal: AbortSignal;
    readonly work: (zip: ZipWriter) => Promise<void>;
    readonly check?: (unfinished: string) => Promise<void>;
  },
): Promise<void> {
  const unfinished = path.join(path.dirname(file), `.${path.basename(file)}.${randomUUID()}.unfinished`);
  try {
    await writeEntries(unfinished, options);
    const handle = await open(unfinished, 'r');
    await handle.sync().finally(() => handle.close());
    await options.check?.(unfinished);
    options.signal.throwIfAborted();
    await rename(unfinished, file);
  } finally {
    await rm(unfinished, { force: true });
  }
}

async function writeEntries(
  file: string,
  { signal, work }: { signal: AbortSignal; work: (zip: ZipWriter) => Promise<void> },
): Promise<void> {
  const zip = new yazl.ZipFile();
  const stop = new AbortController();
  const output = Readable.from(zip.outputStream, { objectMode: false });
  zip.on('error', (error: Error) => stop.abort(error));
  const written = pipeline(output, createWriteStream(file, { flags: 'wx', mode: 0o600 }), {
    signal: AbortSignal.any([signal, stop.signal]),
  });
  // What fails on the way to the disk ends the entry that is just being added, which would wait for ever.
  written.catch((error: unknown) => stop.abort(error));
  try {
    await work({ add: (entry, content, { packed = true } = {}) => addEntry(zip, { entry, content, packed, stop }) });
    zip.end();
    await written;
  } catch (error) {
    stop.abort(error);
    await written.catch(() => undefined);
    throw error;
  }
}

/** SHA-256 of a file's content, hexadecimal. */
export async function fingerprintOfFile(file: string): Promise<string> {
  const hash = createHash('sha256');
  await pipeline(createReadStream(file), hash);
  return hash.digest('hex');
}

async function addEntry(
  zip: yazl.ZipFile,
  added: { entry: string; content: Readable | Uint8Array; packed: boolean; stop: AbortController },
): Promise<WrittenEntry> {
  const { entry, content, packed, stop } = added;
  const hash = createHash('sha256');
  let bytes = 0;
  const measure = new Transform({
    transform(chunk: Buffer, _encoding, next) {
      bytes += chunk.length;
      hash.update(chunk);
      next(null, chunk);
    },
  });
  const source = content instanceof Readable ? content : Readable.from([Buffer.from(content)]);
  const ended = new Promise<void>((resolve, reject) => {
    measure.once('end', resolve);
    measure.once('error', reject);
  });
  zip.addReadStream(measure, entry, { compress: packed, mode: 0o100600 });
  await Promise.all([pipeline(source, measure, { signal: stop.signal }), ended]);
  return { bytes, fingerprint: hash.digest('hex') };
}
