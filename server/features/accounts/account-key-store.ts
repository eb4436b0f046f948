import type { Knex } from 'knex';

export type KeyPurpose = 'reset' | 'email';

/** A newer key of the same purpose takes the place of the older ones. */
export async function replaceAccountKey(
  transaction: Knex.Transaction,
  key: { keyHash: string; personId: string; purpose: KeyPurpose; email: string | null; at: Date; expiresAt: Date },
): Promise<void> {
  await transaction.raw('delete from account_keys where person_id = :personId and purpose = :purpose', key);
  await transaction.raw(
    `insert into account_keys (key_hash, person_id, purpose, email, made_at, expires_at)
     values (:keyHash, :personId, :purpose, :email, :at, :expiresAt)`,
    key,
  );
}

export async function keyMadeSince(
  db: Knex,
  asked: { personId: string; purpose: KeyPurpose; since: Date },
): Promise<boolean> {
  const { rows } = await db.raw<{ rows: { found: boolean }[] }>(
    `select exists (select 1 from account_keys
       where person_id = :personId and purpose = :purpose and made_at > :since) as found`,
    asked,
  );
  return rows[0]?.found ?? false;
}

/** Uses a key up; `null` when it was used, has expired or was never made. */
export async function useAccountKey(
  transaction: Knex.Transaction,
  key: { keyHash: string; purpose: KeyPurpose; at: Date },
): Promise<{ personId: string; email: string | null } | null> {
  const { rows } = await transaction.raw<{ rows: { personId: string; email: string | null }[] }>(
    `update account_keys set used_at = :at
     where key_hash = :keyHash and purpose = :purpose and used_at is null and expires_at > :at
     returning person_id as "personId", email`,
    key,
  );
  return rows[0] ?? null;
}

/** Every key of a person, of whatever purpose. */
export async function deleteAccountKeys(transaction: Knex.Transaction, personId: string): Promise<void> {
  await transaction.raw('delete from account_keys where person_id = ?', [personId]);
}
