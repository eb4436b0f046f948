import type { Request, RequestHandler } from 'express';
import { AppError } from './app-error.ts';
import { isBearer } from './bearer.ts';

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Lets a request that changes something through only when the browser says that our own pages made it. A bearer request
 * carries nothing that a foreign page could borrow, so it is not asked.
 */
export const originGuard: RequestHandler = (request, _response, next) => {
  if (SAFE_METHODS.has(request.method) || isBearer(request) || comesFromOurPages(request)) return next();
  next(new AppError('cross_site', 'This request did not come from a page of this site, so it was not carried out.'));
};

function comesFromOurPages(request: Request): boolean {
  const site = request.get('sec-fetch-site');
  if (site !== undefined) return site === 'same-origin' || site === 'none';
  // Browsers leave Sec-Fetch-Site out on plain http beyond this machine; they still send Origin with unsafe methods.
  const origin = request.get('origin');
  return origin !== undefined && URL.canParse(origin) && new URL(origin).host === request.host;
}
