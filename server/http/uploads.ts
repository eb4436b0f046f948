import type { Request, Response } from 'express';
import multer from 'multer';
import type { UploadBody } from '#contract/endpoint.ts';
import type { Problem } from '#contract/errors.ts';
import { AppError } from './app-error.ts';
import { HashingStorage } from './hashing-storage.ts';
import type { UploadedFile } from './request-context.ts';

/** The one field of an upload. */
export const UPLOAD_FIELD = 'file';

/** Room for the borders and headers of the parts around the files. */
const ENVELOPE_BYTES = 64 * 1024;

interface Receiving {
  readonly request: Request;
  readonly response: Response;
  readonly limits: UploadBody;
  readonly folder: string;
  readonly signal: AbortSignal;
}

/** Receives the files of a multipart request, lets the work have them, and removes them again whatever happened. */
export async function withUploads<T>(
  receiving: Receiving,
  work: (files: readonly UploadedFile[]) => Promise<T>,
): Promise<T> {
  const { request, limits, signal } = receiving;
  const mostBytes = limits.maxBytes * limits.maxFiles + ENVELOPE_BYTES;
  if (request.is('multipart/form-data') !== 'multipart/form-data') throw notMultipart();
  if (Number(request.get('content-length') ?? 0) > mostBytes) throw tooLarge(limits);

  const stop = new AbortController();
  const refusal = makeRefusal(signal);
  const refuse = (): void => {
    request.unpipe();
    request.resume();
    refusal.reject(tooLarge(limits));
  };
  const storage = new HashingStorage({
    folder: receiving.folder,
    signal: AbortSignal.any([signal, stop.signal]),
    onTooLarge: refuse,
  });
  refuseBeyond(request, { mostBytes, refuse });
  try {
    const problems = await Promise.race([readParts(receiving, storage), refusal.promise]);
    if (storage.files.length === 0 && problems.length === 0)
      problems.push({ path: 'files', message: 'Choose a file to upload.' });
    if (problems.length > 0) throw new AppError('invalid_input', 'The upload is not what is asked for here.', problems);
    return await work(storage.files);
  } finally {
    stop.abort();
    await storage.removeAll();
  }
}

/** A promise that never answers but may fail: by `reject`, or because the client has gone or the time is over. */
function makeRefusal(signal: AbortSignal): { promise: Promise<never>; reject: (error: unknown) => void } {
  let reject: (error: unknown) => void = () => undefined;
  const promise = new Promise<never>((_resolve, rejectPromise) => {
    reject = rejectPromise;
  });
  // Once the upload is whole nobody waits for it any more.
  promise.catch(() => undefined);
  if (signal.aborted) reject(signal.reason);
  signal.addEventListener('abort', () => reject(signal.reason), { once: true });
  return { promise, reject };
}

/** A body without a declared length is counted as it comes, also the parts that are skipped. */
function refuseBeyond(request: Request, { mostBytes, refuse }: { mostBytes: number; refuse: () => void }): void {
  let seen = 0;
  request.on('data', (chunk: Buffer) => {
    seen += chunk.length;
    if (seen > mostBytes) refuse();
  });
}

/** Reads to the end of the form; answers what is wrong with its parts. */
async function readParts(receiving: Receiving, storage: HashingStorage): Promise<Problem[]> {
  const { request, response, limits } = receiving;
  const problems: Problem[] = [];
  let files = 0;
  const parts = multer({
    storage,
    defParamCharset: 'utf8',
    limits: { fileSize: limits.maxBytes, fields: 20, parts: 20 + limits.maxFiles, fieldSize: 1024, headerPairs: 50 },
    fileFilter(_request, file, take) {
      const inField = file.fieldname === UPLOAD_FIELD;
      if (inField) files += 1;
      if (!inField) problems.push(wrongField(file.fieldname));
      else if (files > limits.maxFiles) problems.push(oneTooMany(files - 1, limits.maxFiles));
      take(null, inField && files <= limits.maxFiles);
    },
  }).any();
  await new Promise<void>((resolve, reject) => {
    parts(request, response, (error) => (error ? reject(asUploadError(error, limits)) : resolve()));
  });
  const texts: unknown = request.body;
  const names = typeof texts === 'object' && texts !== null ? Object.keys(texts) : [];
  return [...problems, ...names.map((name) => (name === UPLOAD_FIELD ? textForFile() : wrongField(name)))];
}

function wrongField(name: string): Problem {
  return {
    path: `body.${name.slice(0, 100)}`,
    message: `Send the file in the field “${UPLOAD_FIELD}”, and nothing else.`,
  };
}

function textForFile(): Problem {
  return { path: 'files', message: `The field “${UPLOAD_FIELD}” holds text where a file is due.` };
}

function oneTooMany(index: number, maxFiles: number): Problem {
  const message = maxFiles === 1 ? 'Send one file at a time.' : `Send at most ${maxFiles} files at a time.`;
  return { path: `files.${index}`, message };
}

function notMultipart(): AppError {
  return new AppError('unreadable_body', `Send the file as multipart form data, in the field “${UPLOAD_FIELD}”.`);
}

function tooLarge({ maxBytes }: UploadBody): AppError {
  const limit = maxBytes >= 1024 * 1024 ? `${Math.floor(maxBytes / (1024 * 1024))} MB` : `${maxBytes} bytes`;
  return new AppError('too_large', `The file is larger than ${limit}, the most that is taken at once.`);
}

/** A fault of the form becomes the caller's; a fault of our own disk stays one of ours. */
function asUploadError(error: unknown, limits: UploadBody): unknown {
  if (error instanceof AppError) return error;
  if (error instanceof multer.MulterError) {
    if (error.code === 'LIMIT_FILE_SIZE') return tooLarge(limits);
    const path = error.field === undefined ? 'body' : `body.${error.field.slice(0, 100)}`;
    const message = `The form is not one of ours: ${error.message.toLowerCase()}.`;
    return new AppError('invalid_input', 'The upload is not what is asked for here.', [{ path, message }]);
  }
  if (error instanceof Error && 'syscall' in error) return error;
  return new AppError(
    'unreadable_body',
    'The upload is cut off or is not a form that can be read. Send it again.',
    [],
    {
      cause: error,
    },
  );
}
