import type { Knex } from 'knex';

export interface TwoFactor {
  readonly email: string;
  /** Sealed. */
  readonly secret: string | null;
  readonly since: Date | null;
}

export async function findTwoFactor(db: Knex, personId: string): Promise<TwoFactor | null> {
  const { rows } = await db.raw<{ rows: TwoFactor[] }>(
    `select people.email, people.two_factor_secret as secret, people.two_factor_since as since
     from people where people.id = ?`,
    [personId],
  );
  return rows[0] ?? null;
}

/** A secret that is not confirmed yet takes the place of an older one that was not. @returns false where one is in use */
export async function setTwoFactorSecret(db: Knex, change: { personId: string; secret: string }): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    `update people set two_factor_secret = :secret, two_factor_step = null
     where id = :personId and two_factor_since is null`,
    change,
  );
  return result.rowCount === 1;
}

/** @returns false when it was begun meanwhile */
export async function beginTwoFactor(
  transaction: Knex.Transaction,
  change: { personId: string; step: number; at: Date },
): Promise<boolean> {
  const result = await transaction.raw<{ rowCount: number }>(
    `update people set two_factor_since = :at, two_factor_step = :step
     where id = :personId and two_factor_since is null and two_factor_secret is not null`,
    change,
  );
  return result.rowCount === 1;
}

export async function removeTwoFactor(transaction: Knex.Transaction, personId: string): Promise<void> {
  await transaction.raw(
    `update people set two_factor_secret = null, two_factor_since = null, two_factor_step = null where id = ?`,
    [personId],
  );
  await transaction.raw('delete from recovery_codes where person_id = ?', [personId]);
}

/** Uses up a code's time step. @returns false when this step, or a later one, was used before */
export async function spendTwoFactorStep(db: Knex, use: { personId: string; step: number }): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    `update people set two_factor_step = :step
     where id = :personId and two_factor_since is not null and (two_factor_step is null or two_factor_step < :step)`,
    use,
  );
  return result.rowCount === 1;
}

export async function replaceRecoveryCodes(
  transaction: Knex.Transaction,
  codes: { personId: string; hashes: readonly string[] },
): Promise<void> {
  await transaction.raw('delete from recovery_codes where person_id = ?', [codes.personId]);
  await transaction.raw('insert into recovery_codes (person_id, code_hash) select ?, unnest(?::text[])', [
    codes.personId,
    [...codes.hashes],
  ]);
}

/** Uses up a recovery code. @returns false when there is none such, or it was used before */
export async function spendRecoveryCode(db: Knex, use: { personId: string; hash: string; at: Date }): Promise<boolean> {
  const result = await db.raw<{ rowCount: number }>(
    `update recovery_codes set used_at = :at where person_id = :personId and code_hash = :hash and used_at is null`,
    use,
  );
  return result.rowCount === 1;
}
