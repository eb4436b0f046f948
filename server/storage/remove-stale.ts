import { readdir, rm, stat } from 'node:fs/promises';
import path from 'node:path';

/**
 * Removes what killed processes have left behind: files and folders of which nothing has changed since a moment and whose names begin in
 * one of some ways. Nothing else in the folder is touched.
 */
export async function removeStale(folder: string, prefixes: readonly string[], before: Date): Promise<void> {
  const names = await readdir(folder);
  for (const name of names.filter((found) => prefixes.some((prefix) => found.startsWith(prefix)))) {
    const left = path.join(folder, name);
    const { mtime } = await stat(left).catch(() => ({ mtime: before }));
    if (mtime < before) await rm(left, { recursive: true, force: true });
  }
}
