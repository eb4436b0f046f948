import { MAX_FILE_BYTES, uploadWeatherFile, type WeatherFile } from '../../contract/weather.ts';
import { uploadFiles } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { fileSize } from '../../lib/format.ts';

export type UploadState = 'waiting' | 'sending' | 'sent' | 'failed';

export interface Upload {
  readonly id: number;
  readonly teamId: string;
  readonly name: string;
  readonly bytes: number;
  readonly state: UploadState;
  /** 0 to 1 of the bytes that have left. */
  readonly sentShare: number;
  /** What the server made of it; `known` when the same bytes were there before. */
  readonly answer: { readonly file: WeatherFile; readonly known: boolean } | null;
  readonly problem: string | null;
}

type Send = (upload: {
  teamId: string;
  file: File;
  onShare: (share: number) => void;
}) => Promise<NonNullable<Upload['answer']>>;

const AT_ONCE = 2;

/**
 * Files on their way to the server, a request each. It lives beside the pages, so that leaving the library does not
 * stop what is being sent; what has arrived is the server's to remember.
 */
export class UploadQueue {
  readonly #send: Send;
  readonly #files = new Map<number, { file: File; onSent: () => void }>();
  readonly #listeners = new Set<() => void>();
  #uploads: readonly Upload[] = [];
  #nextId = 1;

  constructor(send: Send) {
    this.#send = send;
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.#listeners.add(listener);
    return () => this.#listeners.delete(listener);
  };

  readonly snapshot = (): readonly Upload[] => this.#uploads;

  /** Puts files in line; `onSent` is told each time one of them has arrived. */
  add(teamId: string, files: readonly File[], onSent: () => void): void {
    const added = files.map((file): Upload => {
      const id = this.#nextId++;
      const problem = problemOf(file);
      if (problem === null) this.#files.set(id, { file, onSent });
      const state = problem === null ? 'waiting' : 'failed';
      return { id, teamId, name: file.name, bytes: file.size, state, sentShare: 0, answer: null, problem };
    });
    this.#change([...added, ...this.#uploads]);
    this.#pump();
  }

  /** Sends a failed file again, from its start. */
  retry(id: number): void {
    if (!this.#files.has(id)) return;
    this.#set(id, { state: 'waiting', sentShare: 0, problem: null });
    this.#pump();
  }

  /** Takes what has ended off the list. */
  clearEnded(): void {
    for (const { id, state } of this.#uploads) if (state === 'sent' || state === 'failed') this.#files.delete(id);
    this.#change(this.#uploads.filter(({ state }) => state === 'waiting' || state === 'sending'));
  }

  isBusy(): boolean {
    return this.#uploads.some(({ state }) => state === 'waiting' || state === 'sending');
  }

  #pump(): void {
    const free = AT_ONCE - this.#uploads.filter(({ state }) => state === 'sending').length;
    // Newest files stand first in the list; they are sent in the order in which they were dropped.
    const next = this.#uploads.filter(({ state }) => state === 'waiting').sort((a, b) => a.id - b.id);
    for (const upload of next.slice(0, Math.max(0, free))) void this.#start(upload);
  }

  async #start({ id, teamId }: Upload): Promise<void> {
    const held = this.#files.get(id);
    if (!held) return;
    this.#set(id, { state: 'sending' });
    try {
      const onShare = (sentShare: number) => this.#set(id, { sentShare });
      const answer = await this.#send({ teamId, file: held.file, onShare });
      this.#files.delete(id);
      this.#set(id, { state: 'sent', sentShare: 1, answer });
      held.onSent();
    } catch (error) {
      this.#set(id, { state: 'failed', problem: errorSentence(error) });
    }
    this.#pump();
  }

  #set(id: number, change: Partial<Upload>): void {
    this.#change(this.#uploads.map((upload) => (upload.id === id ? { ...upload, ...change } : upload)));
  }

  #change(uploads: readonly Upload[]): void {
    this.#uploads = uploads;
    for (const listener of this.#listeners) listener();
  }
}

/** What is known to be wrong before a byte is sent; null when the server has to look. */
function problemOf(file: File): string | null {
  if (file.size === 0) return 'The file is empty, or is a folder. Choose the files themselves.';
  if (file.size <= MAX_FILE_BYTES) return null;
  return `The file is ${fileSize(file.size)}; at most ${fileSize(MAX_FILE_BYTES)} are taken. One year of hours is about 2 MB.`;
}

/** The queue of this page. */
export const uploadQueue = new UploadQueue(async ({ teamId, file, onShare }) =>
  uploadFiles(
    uploadWeatherFile,
    { params: { teamId }, query: {}, files: [file] },
    { onProgress: ({ sentBytes, totalBytes }) => onShare(totalBytes > 0 ? sentBytes / totalBytes : 0) },
  ),
);

if (typeof window !== 'undefined') {
  window.addEventListener('beforeunload', (event) => {
    if (uploadQueue.isBusy()) event.preventDefault();
  });
}
