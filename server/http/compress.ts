import compression from 'compression';
import type { Request, Response } from 'express';

const pack = compression();

/** What is written from now on goes over the wire packed, where it is worth it and the client takes it. */
export function compress({ request, response }: { request: Request; response: Response }): Promise<void> {
  return new Promise((resolve, reject) => {
    pack(request, response, (error?: unknown) => (error === undefined ? resolve() : reject(error)));
  });
}
