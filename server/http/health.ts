import type { RequestHandler } from 'express';
import type { Knex } from 'knex';
import { databaseAnswers } from '../db/database-answers.ts';
import { AppError } from './app-error.ts';

/**
 * Ready when the database answers, until the server begins to close: a proxy then sends its requests elsewhere while those at hand are
 * finished. Stands outside the declarations, as it needs no account and no session.
 */
export function health(db: Knex, closing: AbortSignal): RequestHandler {
  return async (_request, response) => {
    if (closing.aborted)
      throw new AppError('unavailable', 'This server is closing. Try again shortly.', [], { retryAfterS: 5 });
    if (!(await databaseAnswers(db)))
      throw new AppError('unavailable', 'The database is away for the moment.', [], { retryAfterS: 5 });
    response.set('Cache-Control', 'no-store').json({ status: 'ok' });
  };
}
