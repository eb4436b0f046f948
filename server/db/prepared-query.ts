/**
 * A query that is asked with every request: PostgreSQL plans it once a connection, and it goes past the builder of queries, which costs
 * more than the answer. Over the same pool as everything else; never within a transaction.
 */
import type { Knex } from 'knex';
import type pg from 'pg';

/** @param query.name the same for the same text, always; values stand as $1, $2, … */
export async function preparedQuery<R extends pg.QueryResultRow>(
  db: Knex,
  query: { readonly name: string; readonly text: string; readonly values: readonly unknown[] },
): Promise<R[]> {
  const connection: pg.PoolClient = await db.client.acquireConnection();
  try {
    const { rows } = await connection.query<R>({ name: query.name, text: query.text, values: [...query.values] });
    return rows;
  } finally {
    await db.client.releaseConnection(connection);
  }
}
