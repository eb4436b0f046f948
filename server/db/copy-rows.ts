/**
 * Rows in bulk, as bytes, by COPY in PostgreSQL's binary format: for columns of bytea it takes less than half the time of a
 * query, whose answer is hexadecimal text.
 */
import type { Knex } from 'knex';
import type pg from 'pg';
import { to as copyTo } from 'pg-copy-streams';

/** Signature, flags and length of the header's extension, of which there is none. */
const HEADER_BYTES = 11 + 4 + 4;
const END_OF_ROWS = -1;
const NULL_FIELD = -1;

/**
 * The rows of a query, one list of fields each, in PostgreSQL's binary form; null where a field is.
 * @param query written by us, with `?` for values, which are escaped: COPY takes no parameters
 * @throws the reason of `signal` when it aborts
 */
export async function* copyRows(
  db: Knex,
  { query, values, signal }: { query: string; values: readonly string[]; signal: AbortSignal },
): AsyncGenerator<readonly (Buffer | null)[]> {
  const text = `copy (${db.raw(query, [...values]).toQuery()}) to stdout (format binary)`;
  const connection: pg.PoolClient = await db.client.acquireConnection();
  const stream = connection.query(copyTo(text));
  let whole = false;
  try {
    const bytes = new ByteReader(stream);
    await bytes.take(HEADER_BYTES);
    for (;;) {
      signal.throwIfAborted();
      const fields = (await bytes.take(2)).readInt16BE();
      if (fields === END_OF_ROWS) break;
      yield await readRow(bytes, fields);
    }
    await bytes.end();
    whole = true;
  } finally {
    // Rows that nobody reads any more would stand before the answer to the next query of this connection.
    if (!whole) await db.client.destroyRawConnection(connection);
    await db.client.releaseConnection(connection);
  }
}

async function readRow(bytes: ByteReader, fields: number): Promise<readonly (Buffer | null)[]> {
  const row: (Buffer | null)[] = [];
  for (let field = 0; field < fields; field++) {
    const length = (await bytes.take(4)).readInt32BE();
    row.push(length === NULL_FIELD ? null : await bytes.take(length));
  }
  return row;
}

/** A stream of chunks, taken in pieces of any length. */
class ByteReader {
  readonly #chunks: AsyncIterator<Buffer>;
  #rest: Buffer = Buffer.alloc(0);

  constructor(chunks: AsyncIterable<Buffer>) {
    this.#chunks = chunks[Symbol.asyncIterator]();
  }

  /** @throws RangeError when the stream ends before */
  async take(length: number): Promise<Buffer> {
    if (this.#rest.length < length) this.#rest = await this.#gather(length);
    const taken = this.#rest.subarray(0, length);
    this.#rest = this.#rest.subarray(length);
    return taken;
  }

  /** Reads what may follow the last row, so that the connection is free again. */
  async end(): Promise<void> {
    while (!(await this.#chunks.next()).done);
  }

  async #gather(length: number): Promise<Buffer> {
    const parts = [this.#rest];
    let found = this.#rest.length;
    while (found < length) {
      const next = await this.#chunks.next();
      if (next.done) throw new RangeError('the rows ended in the middle of one');
      parts.push(next.value);
      found += next.value.length;
    }
    return Buffer.concat(parts, found);
  }
}
