import type { Knex } from 'knex';

/** Until when signing in to an account rests; `null` when it does not. */
export async function findRest(db: Knex, key: { accountHash: string; at: Date }): Promise<Date | null> {
  const { rows } = await db.raw<{ rows: { until: Date }[] }>(
    `select sign_in_failures.rests_until as until from sign_in_failures
     where sign_in_failures.account_hash = :accountHash and sign_in_failures.rests_until > :at`,
    key,
  );
  return rows[0]?.until ?? null;
}

/** Counts one more in a row, in one statement, whichever process it comes to; a day without one begins anew. */
export async function countFailure(
  db: Knex,
  failure: { accountHash: string; at: Date; restAfter: number; restMinutes: number },
): Promise<void> {
  await db.raw(
    `insert into sign_in_failures as held (account_hash, failures, last_at) values (:accountHash, 1, :at)
     on conflict (account_hash) do update set
       failures = case when held.last_at < cast(:at as timestamptz) - interval '1 day' then 1 else held.failures + 1 end,
       last_at = :at,
       rests_until = case
         when held.last_at >= cast(:at as timestamptz) - interval '1 day' and held.failures + 1 >= :restAfter
         then cast(:at as timestamptz) + make_interval(mins => :restMinutes) end`,
    failure,
  );
}

export async function forgetFailures(db: Knex, accountHash: string): Promise<void> {
  await db.raw('delete from sign_in_failures where account_hash = ?', [accountHash]);
}

export async function deleteOldFailures(db: Knex, at: Date): Promise<void> {
  await db.raw(`delete from sign_in_failures where last_at < cast(? as timestamptz) - interval '2 days'`, [at]);
}
