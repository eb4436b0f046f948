import { AppError } from './app-error.ts';
import type { RequestContext } from './request-context.ts';

/** Who takes along what a request downloads: the person who asks, or for whom a program does. */
export function takerOf({ actor, requestId }: Pick<RequestContext, 'actor' | 'requestId'>): {
  personId: string;
  tokenId: string | null;
  requestId: string;
} {
  if (actor.kind === 'signed-out') throw new AppError('not_signed_in', 'Sign in first.');
  return { personId: actor.personId, tokenId: actor.kind === 'token' ? actor.tokenId : null, requestId };
}
