import knexPkg, { type Knex } from 'knex';

const { knex } = knexPkg;

export interface ConnectionOptions {
  readonly databaseUrl: string;
  /** Shown by PostgreSQL beside each of our connections. */
  readonly applicationName?: string;
  readonly maxConnections?: number;
  /** Longest time for one statement; 0 for none. */
  readonly statementTimeoutMs?: number;
}

/**
 * A pool of connections that opens none before it is asked and drops a broken one silently: a lost database shows as an
 * error of the statement that meets it, and the next statement tries a new connection.
 */
export function connect(options: ConnectionOptions): Knex {
  const { databaseUrl, applicationName = 'muslin', maxConnections = 10, statementTimeoutMs = 20_000 } = options;
  return knex({
    client: 'pg',
    connection: {
      connectionString: databaseUrl,
      application_name: applicationName,
      connectionTimeoutMillis: 5_000,
      statement_timeout: statementTimeoutMs,
      idle_in_transaction_session_timeout: 60_000,
      keepAlive: true,
    },
    pool: { min: 0, max: maxConnections, idleTimeoutMillis: 30_000 },
    acquireConnectionTimeout: 6_000,
    log: quiet,
  });
}

const nothing = (): void => undefined;
/** Knex would print lost connections by itself; they reach our own log through the statement that failed. */
const quiet = { warn: nothing, error: nothing, deprecate: nothing, debug: nothing };
