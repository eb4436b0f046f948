import { randomUUID } from 'node:crypto';
import { copyFile, mkdir, open, readFile, rename, rm, stat, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { isOriginalKey, type OriginalMemory, type OriginalStore } from './original-store.ts';
import { ReusableBytes } from './reusable-bytes.ts';

const FILE_MODE = 0o600;
const FOLDER_MODE = 0o700;

/** Originals as files of one folder, readable by the server's user alone. */
export function createFolderStore(root: string): OriginalStore {
  const place = (key: string): string => {
    if (!isOriginalKey(key)) throw new RangeError(`not a key of an original: ${key.slice(0, 80)}`);
    return path.join(root, key);
  };
  return {
    async put(key, from) {
      const target = place(key);
      if (await exists(target)) return;
      const folder = path.dirname(target);
      await mkdir(folder, { recursive: true, mode: FOLDER_MODE });
      // Written beside its place under another name, so that a crash half-way never leaves a short original.
      const waiting = path.join(folder, `${randomUUID()}.part`);
      try {
        await (typeof from === 'string' ? copyFile(from, waiting) : writeFile(waiting, from));
        await settle(waiting);
        await rename(waiting, target);
      } catch (error) {
        await rm(waiting, { force: true });
        throw error;
      }
      await flushFolder(folder);
    },
    async get(key) {
      const handle = await open(place(key), 'r');
      return handle.createReadStream();
    },
    async read(key, into) {
      return into === undefined ? await readFile(place(key)) : await readInto(place(key), into);
    },
    newMemory: () => new ReusableBytes(),
    async remove(key) {
      await rm(place(key), { force: true });
    },
  };
}

async function readInto(file: string, into: OriginalMemory): Promise<Uint8Array> {
  const handle = await open(file, 'r');
  try {
    const { size } = await handle.stat();
    const bytes = into.take(size);
    let read = 0;
    while (read < size) {
      const { bytesRead } = await handle.read(bytes, read, size - read, read);
      if (bytesRead === 0) throw new Error(`the original ${path.basename(file)} ends after ${read} of ${size} bytes`);
      read += bytesRead;
    }
    return bytes;
  } finally {
    await handle.close();
  }
}

async function exists(file: string): Promise<boolean> {
  return await stat(file).then(
    () => true,
    () => false,
  );
}

async function settle(file: string): Promise<void> {
  const handle = await open(file, 'r+');
  try {
    await handle.chmod(FILE_MODE);
    await handle.sync();
  } finally {
    await handle.close();
  }
}

/** The rename itself lasts only once the folder has reached the disk. */
async function flushFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}
