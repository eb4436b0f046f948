import type { RequestHandler } from 'express';
import type { Knex } from 'knex';
import { databaseAnswers } from '../db/database-answers.ts';
import { AppError } from './app-error.ts';

/** Ready when the database answers; stands outside the declarations, as it needs no account and no session. */
export function health(db: Knex): RequestHandler {
  return async (_request, response) => {
    if (!(await databaseAnswers(db)))
      throw new AppError('unavailable', 'The database is away for the moment.', [], { retryAfterS: 5 });
    response.set('Cache-Control', 'no-store').json({ status: 'ok' });
  };
}
