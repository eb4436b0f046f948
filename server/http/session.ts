import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Knex } from 'knex';
import type { Deps } from '../deps.ts';
import { SESSION_COOKIE } from './session-cookie.ts';

/** A session ends a week after it began, used or not. */
export const SESSION_DAYS = 7;

/**
 * Sessions in our own table: only a random id, signed, goes to the browser. Nothing is stored before somebody signs in, and
 * nothing is written while a session is only used.
 */
export function sessions(deps: Deps): RequestHandler {
  const Store = connectPgSimple(session);
  return session({
    name: SESSION_COOKIE,
    secret: [...deps.sessionSecrets],
    resave: false,
    saveUninitialized: false,
    store: new Store({
      pgPromise: { any: (statement: string, values: readonly unknown[]) => rowsOf(deps.db, { statement, values }) },
      tableName: 'sessions',
      disableTouch: true,
      pruneSessionInterval: false,
      errorLog: (...what: unknown[]) => deps.log.error({ what }, 'the store of sessions failed'),
    }),
    cookie: { httpOnly: true, sameSite: 'lax', secure: 'auto', path: '/', maxAge: SESSION_DAYS * 24 * 3_600_000 },
  });
}

/** The store's own SQL, with $1, $2, …, over the one pool that everything else uses. */
async function rowsOf(db: Knex, query: { statement: string; values: readonly unknown[] }): Promise<readonly unknown[]> {
  const named = query.statement.replace(/\$(\d+)/g, ':value$1');
  const values = Object.fromEntries(query.values.map((value, index) => [`value${index + 1}`, toBinding(value)]));
  const { rows } = await db.raw<{ rows: unknown[] }>(named, values);
  return rows;
}

function toBinding(value: unknown): string | number {
  return typeof value === 'string' || typeof value === 'number' ? value : JSON.stringify(value);
}
