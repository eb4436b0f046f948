/** Of a drop, what is needed to find its files: a browser's own entries answer to this. */
export interface DroppedEntry {
  readonly name: string;
  readonly isDirectory: boolean;
}

interface DroppedFile extends DroppedEntry {
  file(found: (file: File) => void, failed: (error: unknown) => void): void;
}

interface DroppedFolder extends DroppedEntry {
  createReader(): { readEntries(found: (entries: DroppedEntry[]) => void, failed: (error: unknown) => void): void };
}

/** Files that systems leave in folders by themselves. */
const isLitter = (name: string) => name.startsWith('.') || name === 'Thumbs.db' || name === 'desktop.ini';

/** Every file of what was dropped, folders opened, by name within each; what systems leave there is passed over. */
export async function filesOfEntries(entries: readonly DroppedEntry[]): Promise<readonly File[]> {
  const files: File[] = [];
  for (const entry of entries) {
    if (isFolder(entry)) files.push(...(await filesOfEntries(await entriesOf(entry))));
    else if (isFile(entry)) files.push(await new Promise<File>((found, failed) => entry.file(found, failed)));
  }
  return files;
}

function isFolder(entry: DroppedEntry): entry is DroppedFolder {
  return entry.isDirectory && 'createReader' in entry;
}

function isFile(entry: DroppedEntry): entry is DroppedFile {
  return !entry.isDirectory && 'file' in entry;
}

/** A browser hands a folder out in portions, the last one empty. */
async function entriesOf(folder: DroppedFolder): Promise<readonly DroppedEntry[]> {
  const reader = folder.createReader();
  const all: DroppedEntry[] = [];
  for (;;) {
    const portion = await new Promise<DroppedEntry[]>((found, failed) => reader.readEntries(found, failed));
    if (portion.length === 0) break;
    all.push(...portion.filter(({ name }) => !isLitter(name)));
  }
  return all.sort((one, other) => one.name.localeCompare(other.name, 'en', { numeric: true }));
}

/** The entries must be taken while the drop is being told; afterwards the browser has forgotten them. */
export function entriesOfDrop({ items }: DataTransfer): readonly DroppedEntry[] {
  return [...items].flatMap((item) => item.webkitGetAsEntry() ?? []);
}
