import { readdir, rm, stat } from 'node:fs/promises';
import path from 'node:path';
import { UPLOAD_PREFIX } from './hashing-storage.ts';

/** Removes what uploads left behind whose process was killed; nothing else in the folder is touched. */
export async function removeStaleUploads(folder: string, before: Date): Promise<void> {
  const names = await readdir(folder);
  for (const name of names.filter((found) => found.startsWith(UPLOAD_PREFIX))) {
    const file = path.join(folder, name);
    const { mtime } = await stat(file).catch(() => ({ mtime: before }));
    if (mtime < before) await rm(file, { force: true });
  }
}
