import { MAX_FILE_BYTES, type WeatherFile } from '../../contract/weather.ts';
import { MAX_ARCHIVE_BYTES } from '../../contract/weather-batches.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { fileSize, plural } from '../../lib/format.ts';

export type UploadState = 'waiting' | 'sending' | 'sent' | 'failed';

export interface Upload {
  readonly id: number;
  readonly teamId: string;
  /** The batch that it goes into, once that has begun; null for a file that was brought by itself. */
  readonly batchId: string | null;
  readonly name: string;
  readonly bytes: number;
  readonly state: UploadState;
  /** 0 to 1 of the bytes that have left. */
  readonly sentShare: number;
  /** What the server made of a file; `known` when the same bytes were there before. Null of an archive. */
  readonly answer: { readonly file: WeatherFile; readonly known: boolean } | null;
  readonly problem: string | null;
}

interface Sending {
  readonly teamId: string;
  readonly file: File;
  readonly onShare: (share: number) => void;
  readonly signal: AbortSignal;
}

/** How a queue reaches the server. */
export interface UploadRoads {
  /** @returns the id of the new batch */
  startBatch(batch: { teamId: string; name: string }): Promise<string>;
  sendFile(sending: Sending & { batchId: string | null }): Promise<NonNullable<Upload['answer']>>;
  sendArchive(sending: Sending & { batchId: string }): Promise<void>;
}

/** What was chosen or dropped at once. */
interface Drop {
  readonly teamId: string;
  readonly name: string;
  readonly files: number;
  batch: Promise<string> | null;
  /** Told when a batch has begun, and each time something has arrived. */
  readonly onChange: () => void;
}

interface Held {
  readonly file: File;
  readonly drop: Drop;
  readonly stop: AbortController;
}

const AT_ONCE = 2;

/**
 * Files on their way to the server, a request each. It lives beside the pages, so that leaving the library does not
 * stop what is being sent; what has arrived is the server's to remember.
 */
export class UploadQueue {
  readonly #roads: UploadRoads;
  readonly #held = new Map<number, Held>();
  readonly #listeners = new Set<() => void>();
  #uploads: readonly Upload[] = [];
  #nextId = 1;

  constructor(roads: UploadRoads) {
    this.#roads = roads;
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };

  readonly snapshot = (): readonly Upload[] => this.#uploads;

  /** Puts files in line. Several, or an archive, become one batch; a single file goes by itself. */
  add(teamId: string, files: readonly File[], onChange: () => void): void {
    const full = files.filter(({ size }) => size > 0);
    const name = `${full[0]?.name}${full.length > 1 ? ` and ${plural(full.length - 1, 'other file')}` : ''}`;
    const drop: Drop = { teamId, name, files: full.length, batch: null, onChange };
    const added = files.map((file): Upload => {
      const id = this.#nextId++;
      const problem = file.size === 0 ? EMPTY : null;
      if (problem === null) this.#held.set(id, { file, drop, stop: new AbortController() });
      const state = problem === null ? 'waiting' : 'failed';
      const { name, size: bytes } = file;
      return { id, teamId, batchId: null, name, bytes, state, sentShare: 0, answer: null, problem };
    });
    this.#change([...added, ...this.#uploads]);
    this.#pump();
  }

  /** Whether a failed file can be sent again. */
  isHeld(id: number): boolean {
    return this.#held.has(id);
  }

  /** Sends a failed file again, from its start. */
  retry(id: number): void {
    if (!this.#held.has(id)) return;
    this.#set(id, { state: 'waiting', sentShare: 0, problem: null });
    this.#pump();
  }

  /** Sends no more of a batch, as it was cancelled. */
  stopBatch(batchId: string): void {
    const stopped = this.#uploads.filter((upload) => upload.batchId === batchId && isUnderWay(upload));
    for (const { id } of stopped) {
      this.#held.get(id)?.stop.abort();
      this.#held.delete(id);
    }
    this.#change(this.#uploads.filter((upload) => !stopped.includes(upload)));
    this.#pump();
  }

  /** Takes what has ended off the list. */
  clearEnded(): void {
    for (const upload of this.#uploads) if (!isUnderWay(upload)) this.#held.delete(upload.id);
    this.#change(this.#uploads.filter(isUnderWay));
  }

  isBusy(): boolean {
    return this.#uploads.some(isUnderWay);
  }

  #pump(): void {
    const free = AT_ONCE - this.#uploads.filter(({ state }) => state === 'sending').length;
    // Newest files stand first in the list; they are sent in the order in which they were dropped.
    const next = this.#uploads.filter(({ state }) => state === 'waiting').sort((a, b) => a.id - b.id);
    for (const upload of next.slice(0, Math.max(0, free))) void this.#start(upload.id);
  }

  async #start(id: number): Promise<void> {
    const held = this.#held.get(id);
    if (!held) return;
    this.#set(id, { state: 'sending' });
    try {
      const answer = await this.#send(id, held);
      this.#held.delete(id);
      this.#set(id, { state: 'sent', sentShare: 1, answer });
      held.drop.onChange();
    } catch (error) {
      // One that was stopped has left the list, and nothing is said of it.
      const problem = error instanceof NotTaken ? error.message : errorSentence(error);
      if (error instanceof NotTaken) this.#held.delete(id);
      this.#set(id, { state: 'failed', problem });
    }
    this.#pump();
  }

  async #send(id: number, { file, drop, stop }: Held): Promise<Upload['answer']> {
    const isArchive = await beginsAsZip(file);
    const tooLarge = largerThanTaken(file, isArchive);
    if (tooLarge !== null) throw new NotTaken(tooLarge);
    const batchId = isArchive || drop.files > 1 ? await this.#batchOf(drop) : null;
    const { teamId } = drop;
    const onShare = (sentShare: number) => this.#set(id, { sentShare });
    const sending = { teamId, file, onShare, signal: stop.signal };
    stop.signal.throwIfAborted();
    if (batchId === null || !isArchive) return await this.#roads.sendFile({ ...sending, batchId });
    await this.#roads.sendArchive({ ...sending, batchId });
    return null;
  }

  /** The batch of what was dropped together, begun with the first of it. */
  #batchOf(drop: Drop): Promise<string> {
    drop.batch ??= this.#roads.startBatch({ teamId: drop.teamId, name: drop.name.slice(0, 200) }).then(
      (batchId) => {
        const own = new Set([...this.#held].flatMap(([id, held]) => (held.drop === drop ? [id] : [])));
        this.#change(this.#uploads.map((upload) => (own.has(upload.id) ? { ...upload, batchId } : upload)));
        drop.onChange();
        return batchId;
      },
      (error: unknown) => {
        drop.batch = null;
        throw error;
      },
    );
    return drop.batch;
  }

  #set(id: number, change: Partial<Upload>): void {
    this.#change(this.#uploads.map((upload) => (upload.id === id ? { ...upload, ...change } : upload)));
  }

  #change(uploads: readonly Upload[]): void {
    this.#uploads = uploads;
    for (const listener of this.#listeners) listener();
  }
}

const EMPTY = 'The file is empty, or is a folder. Choose the files themselves.';

/** Known to be refused before a byte was sent; sending it again would change nothing. */
class NotTaken extends Error {}

export function isUnderWay({ state }: Upload): boolean {
  return state === 'waiting' || state === 'sending';
}

/** The first four bytes of a zip's first entry; the name says nothing. */
async function beginsAsZip(file: File): Promise<boolean> {
  try {
    const [p, k, three, four] = new Uint8Array(await file.slice(0, 4).arrayBuffer());
    return p === 0x50 && k === 0x4b && three === 3 && four === 4;
  } catch {
    throw new NotTaken('The file cannot be read from this computer. Choose it again.');
  }
}

function largerThanTaken(file: File, isArchive: boolean): string | null {
  const most = isArchive ? MAX_ARCHIVE_BYTES : MAX_FILE_BYTES;
  if (file.size <= most) return null;
  const hint = isArchive ? 'Send it as several archives.' : 'One year of hours is about 2 MB.';
  return `The file is ${fileSize(file.size)}; at most ${fileSize(most)} are taken. ${hint}`;
}
