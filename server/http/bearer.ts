import type { Request } from 'express';

/** A request of a program with a token, not of a browser with a session. */
export function isBearer(request: Request): boolean {
  return /^bearer(\s|$)/i.test(request.get('authorization') ?? '');
}

/** The token of such a request; empty when it has none. */
export function bearerToken(request: Request): string {
  return (request.get('authorization') ?? '').replace(/^bearer\s*/i, '').trim();
}
