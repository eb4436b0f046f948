import type { Knex } from 'knex';

/** Runs the work in one transaction: all of it is stored when it returns, nothing of it when it throws. */
export function inTransaction<T>(db: Knex, work: (transaction: Knex.Transaction) => Promise<T>): Promise<T> {
  return db.transaction(work);
}
