import { AppError } from '../../http/app-error.ts';
import type { PageStart } from './weather-file-read-model.ts';

/** Sixteen digits of microseconds reach the year 2286. */
const CURSOR = /^(\d{1,16})\.([0-9a-f]{8}(?:-[0-9a-f]{4}){3}-[0-9a-f]{12})$/;

/** Where the next page begins, as the text that the list answers. */
export function writeCursor(last: { uploadedAtUs: string; id: string }): string {
  return Buffer.from(`${last.uploadedAtUs}.${last.id}`).toString('base64url');
}

/** @throws AppError invalid_input when the text did not come from the list */
export function readCursor(cursor: string | undefined): PageStart | null {
  if (cursor === undefined) return null;
  const [, uploadedAtUs, fileId] = CURSOR.exec(Buffer.from(cursor, 'base64url').toString('latin1')) ?? [];
  if (uploadedAtUs === undefined || fileId === undefined) {
    const message = 'This is not where a page of the list begins. Take it from the answer before, or leave it out.';
    throw new AppError('invalid_input', message, [{ path: 'query.after', message }]);
  }
  return { uploadedAtUs, fileId };
}
