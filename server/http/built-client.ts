import { readFile } from 'node:fs/promises';
import path from 'node:path';
import express, { type RequestHandler } from 'express';
import { nonceOf } from './security-headers.ts';

/** Stands in index.html wherever the nonce of the reply belongs (vite.config.ts, `html.cspNonce`). */
const NONCE_PLACE = 'CSP_NONCE';

/**
 * The built client: files with a hash in their name are kept for ever, the page itself never, as it carries a nonce of its
 * own each time. Any other address that a browser opens as a page is the page: its router knows what to show.
 */
export function builtClient(clientDir: string): RequestHandler[] {
  const files = express.static(clientDir, {
    index: false,
    redirect: false,
    setHeaders(response, file) {
      const hashed = path.relative(clientDir, file).startsWith(`assets${path.sep}`);
      response.setHeader('Cache-Control', hashed ? 'public, max-age=31536000, immutable' : 'no-cache');
    },
  });
  const page: RequestHandler = async (request, response, next) => {
    if (!asksForPage(request)) return next();
    const html = await readFile(path.join(clientDir, 'index.html'), 'utf8');
    response
      .set('Cache-Control', 'no-store')
      .type('html')
      .send(html.replaceAll(NONCE_PLACE, nonceOf(response)));
  };
  // index.html by its own name goes the same way as every page; as a plain file it would come without a nonce.
  const notThePage: RequestHandler = (request, response, next) =>
    request.path === '/index.html' ? next() : files(request, response, next);
  return [notThePage, page];
}

function asksForPage(request: express.Request): boolean {
  if (request.method !== 'GET' && request.method !== 'HEAD') return false;
  if (/^\/(api|tiles|assets)(\/|$)/.test(request.path)) return false;
  if ((request.get('accept') ?? '').includes('text/html')) return true;
  // A program that takes anything (curl) gets the page as well, but never in place of a file that is not there.
  return !path.posix.basename(request.path).includes('.') && request.accepts('html') === 'html';
}
