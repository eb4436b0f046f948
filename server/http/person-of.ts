import { AppError } from './app-error.ts';
import type { RequestContext } from './request-context.ts';

/** The person who asks, where the rule of the endpoint lets only people through. */
export function personOf({ actor }: Pick<RequestContext, 'actor'>): string {
  if (actor.kind !== 'person') throw new AppError('not_signed_in', 'Sign in first.');
  return actor.personId;
}
