/** One moment of the whole database, seen the same by us and by pg_dump while the product goes on. */
import pg from 'pg';

export interface TableSum {
  readonly rows: number;
  /** Sum over the rows of a hash of their text: the same for the same rows in any order. */
  readonly checksum: string;
}

export interface DatabaseSnapshot {
  /** Under this name another connection sees the same moment, as long as ours is open. */
  readonly id: string;
  /** Names of the migrations that made it what it is, in their order. */
  readonly migrations: readonly string[];
  readonly tables: Readonly<Record<string, TableSum>>;
  /** Keys of the originals that its rows speak of. */
  readonly originalKeys: readonly string[];
}

/** Holds the moment open while the work runs. @param ownerUrl the owner reads every table, the queue's too */
export async function withSnapshot<T>(ownerUrl: string, work: (snapshot: DatabaseSnapshot) => Promise<T>): Promise<T> {
  return await withReader(ownerUrl, async (client) => {
    const snapshot = await client.query<{ id: string }>('select pg_export_snapshot() as id');
    const migrations = await client.query<{ name: string }>('select name from knex_migrations order by id');
    const keys = await client.query<{ key: string }>(
      `select weather_files.storage_key as key from weather_files
       union select weather_archives.storage_key from weather_archives order by key`,
    );
    return await work({
      id: snapshot.rows[0]?.id ?? '',
      migrations: migrations.rows.map(({ name }) => name),
      tables: await sumTables(client),
      originalKeys: keys.rows.map(({ key }) => key),
    });
  });
}

/** Rows and checksum of every table as they are now. */
export async function readTableSums(ownerUrl: string): Promise<Readonly<Record<string, TableSum>>> {
  return await withReader(ownerUrl, sumTables);
}

async function withReader<T>(ownerUrl: string, work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: ownerUrl, application_name: 'muslin backup' });
  await client.connect();
  try {
    await client.query('begin isolation level repeatable read read only');
    // The text of a row must not hang on how a server or a login is set up.
    await client.query(
      "set local timezone = 'UTC'; set local datestyle = 'ISO, YMD'; set local intervalstyle = 'postgres'; set local bytea_output = 'hex'; set local extra_float_digits = 1",
    );
    return await work(client);
  } finally {
    await client.end();
  }
}

/** All but the note of who migrates just now, which is no content. */
async function sumTables(client: pg.Client): Promise<Readonly<Record<string, TableSum>>> {
  const { rows: names } = await client.query<{ name: string }>(
    `select quote_ident(schemaname) || '.' || quote_ident(tablename) as name from pg_tables
     where schemaname in ('public', 'graphile_worker') and tablename <> 'knex_migrations_lock' order by schemaname, tablename`,
  );
  const sums: Record<string, TableSum> = {};
  for (const { name } of names) {
    const { rows } = await client.query<{ rows: string; checksum: string }>(
      `select count(*) as rows, coalesce(sum(hashtextextended(each::text, 0)), 0)::text as checksum from ${name} as each`,
    );
    sums[name] = { rows: Number(rows[0]?.rows ?? 0), checksum: rows[0]?.checksum ?? '' };
  }
  return sums;
}
