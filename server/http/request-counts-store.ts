import type { Knex } from 'knex';

/** Counts one request in the bucket's minute, in one statement, whichever process it comes to; answers the count so far. */
export async function countRequest(db: Knex, { bucket, minute }: { bucket: string; minute: Date }): Promise<number> {
  const { rows } = await db.raw<{ rows: { requests: number }[] }>(
    `insert into request_counts (bucket, minute, requests) values (?, ?, 1)
     on conflict (bucket, minute) do update set requests = request_counts.requests + 1
     returning request_counts.requests`,
    [bucket, minute],
  );
  return rows[0]?.requests ?? 1;
}

/** Forgets a bucket, so that a person who at last typed the right password begins anew. */
export async function forgetRequests(db: Knex, bucket: string): Promise<void> {
  await db.raw('delete from request_counts where bucket = ?', [bucket]);
}

export async function deleteRequestCountsBefore(db: Knex, minute: Date): Promise<void> {
  await db.raw('delete from request_counts where minute < ?', [minute]);
}
