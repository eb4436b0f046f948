import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/**
 * The folder of real weather files that may stand beside the repository, or null. Nothing of it is ever part of the
 * project: tests that read it are skipped, with the reason, where it is absent.
 */
export const sharedFolder: string | null = folder('../../../shared/');

export const WITHOUT_SHARED = 'the folder of real weather files is not beside the repository';

function folder(path: string): string | null {
  const found = fileURLToPath(new URL(path, import.meta.url));
  return existsSync(`${found}real/groundtruth.csv`) ? found : null;
}

/** Bytes of one of the real files, by its path below `real/`. */
export function realFile(path: string): Uint8Array {
  if (sharedFolder === null) throw new Error(WITHOUT_SHARED);
  return readFileSync(`${sharedFolder}real/${path}`);
}
