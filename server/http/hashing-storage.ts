import { createHash, randomUUID } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { rm } from 'node:fs/promises';
import path from 'node:path';
import { Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { StorageEngine } from 'multer';
import type { UploadedFile } from './request-context.ts';
import { cleanUploadName } from './upload-name.ts';

/** How the names of waiting uploads begin. */
export const UPLOAD_PREFIX = 'upload-';

/**
 * Streams each file of one request to `folder` and hashes it on the way. Every file that it opens is in its own books, so
 * that `removeAll` leaves none behind whatever became of the request.
 */
export class HashingStorage implements StorageEngine {
  readonly files: UploadedFile[] = [];
  readonly #folder: string;
  readonly #signal: AbortSignal;
  readonly #onTooLarge: () => void;
  readonly #writes: { readonly path: string; readonly ended: Promise<unknown> }[] = [];

  /** @param options.onTooLarge called at the first byte beyond the limit, before the rest of the request is seen */
  constructor(options: { folder: string; signal: AbortSignal; onTooLarge: () => void }) {
    this.#folder = options.folder;
    this.#signal = options.signal;
    this.#onTooLarge = options.onTooLarge;
  }

  _handleFile(
    _request: unknown,
    file: Express.Multer.File,
    done: (error?: unknown, info?: Partial<Express.Multer.File>) => void,
  ): void {
    const temporaryPath = path.join(this.#folder, `${UPLOAD_PREFIX}${randomUUID()}`);
    const hash = createHash('sha256');
    let bytes = 0;
    const measure = new Transform({
      transform(chunk: Buffer, _encoding, next) {
        hash.update(chunk);
        bytes += chunk.length;
        next(null, chunk);
      },
    });
    file.stream.once('limit', this.#onTooLarge);
    const ended = pipeline(file.stream, measure, createWriteStream(temporaryPath, { flags: 'wx', mode: 0o600 }), {
      signal: this.#signal,
    });
    this.#writes.push({ path: temporaryPath, ended });
    ended.then(
      () => {
        this.files.push({
          name: cleanUploadName(file.originalname),
          bytes,
          fingerprint: hash.digest('hex'),
          temporaryPath,
        });
        done(null, { size: bytes });
      },
      (error) => done(error),
    );
  }

  /** Multer's own clean-up after a fault; `removeAll` does it in every case. */
  _removeFile(_request: unknown, _file: Express.Multer.File, done: (error: Error | null) => void): void {
    done(null);
  }

  async removeAll(): Promise<void> {
    await Promise.allSettled(this.#writes.map((write) => write.ended));
    await Promise.all(this.#writes.map((write) => rm(write.path, { force: true })));
  }
}
