import { readFile } from 'node:fs/promises';
import path from 'node:path';

const REASONS: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file',
  EISDIR: 'it is a folder',
  EACCES: 'it may not be read by you',
  ERR_FS_FILE_TOO_LARGE: 'it is larger than 2 GiB',
};

/** The bytes of a file, counted from where the caller stands; or a sentence why it cannot be read. */
export async function openFile(name: string, callerDir: string): Promise<Uint8Array | string> {
  try {
    return await readFile(path.resolve(callerDir, name));
  } catch (error) {
    const code = error instanceof Error && 'code' in error ? String(error.code) : '';
    return `${name} cannot be read: ${REASONS[code] ?? (error instanceof Error ? error.message : String(error))}.`;
  }
}
