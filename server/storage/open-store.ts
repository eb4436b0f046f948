import { createFolderStore } from './folder-store.ts';
import type { OriginalStore } from './original-store.ts';
import type { ObjectStoreSettings } from './s3-store.ts';

/** The store of originals that the operator chose: an object store where one is configured, else a folder of this machine. */
export async function openStore(choice: {
  objectStore: ObjectStoreSettings | null;
  originalsDir: string;
}): Promise<OriginalStore> {
  if (choice.objectStore === null) return createFolderStore(choice.originalsDir);
  // Loaded only where it is wanted: the package is half as large as the rest of the server.
  const { createS3Store } = await import('./s3-store.ts');
  return createS3Store(choice.objectStore);
}
