import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Request, Response } from 'express';
import type { FileResponse } from '#contract/endpoint.ts';

/** Bytes to send; `fileName` is what the browser is told to call them. */
export interface FileAnswer {
  readonly body: Uint8Array | Readable;
  readonly fileName?: string;
}

/** Sends bytes under the declared media type; nothing in them is guessed at or run by the browser. */
export async function answerFile(
  web: { request: Request; response: Response },
  { declared, answer }: { declared: FileResponse; answer: FileAnswer },
): Promise<void> {
  const { request, response } = web;
  if (declared.attachment) response.attachment(answer.fileName ?? 'file');
  response.setHeader('Content-Type', declared.mediaType);
  if (!(answer.body instanceof Readable)) {
    response.end(Buffer.from(answer.body.buffer, answer.body.byteOffset, answer.body.byteLength));
    return;
  }
  if (request.method === 'HEAD') {
    answer.body.destroy();
    response.end();
    return;
  }
  await pipeline(answer.body, response);
}
