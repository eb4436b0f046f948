import type { Knex } from 'knex';

export interface PersonSecret {
  readonly id: string;
  readonly passwordHash: string;
}

export async function findPersonByEmail(db: Knex, email: string): Promise<PersonSecret | null> {
  const { rows } = await db.raw<{ rows: PersonSecret[] }>(
    'select people.id, people.password_hash as "passwordHash" from people where people.email = ?',
    [email],
  );
  return rows[0] ?? null;
}

export interface KnownPerson extends PersonSecret {
  readonly email: string;
  readonly name: string;
}

export async function findPersonSecret(db: Knex, personId: string): Promise<KnownPerson | null> {
  const { rows } = await db.raw<{ rows: KnownPerson[] }>(
    `select people.id, people.email, people.name, people.password_hash as "passwordHash"
     from people where people.id = ?`,
    [personId],
  );
  return rows[0] ?? null;
}

export async function setName(db: Knex, change: { personId: string; name: string }): Promise<void> {
  await db.raw('update people set name = :name where id = :personId', change);
}

export async function setPasswordHash(db: Knex, change: { personId: string; passwordHash: string }): Promise<void> {
  await db.raw('update people set password_hash = :passwordHash where id = :personId', change);
}

/** @returns the address that held before */
export async function setEmail(
  transaction: Knex.Transaction,
  change: { personId: string; email: string },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ before: string }] }>(
    `update people set email = :email from people as held
     where people.id = :personId and held.id = people.id returning held.email as before`,
    change,
  );
  return rows[0].before;
}

export async function setNoticesOff(db: Knex, change: { personId: string; off: readonly string[] }): Promise<void> {
  await db.raw('update people set notices_off = ?::text[] where id = ?', [[...change.off], change.personId]);
}

export async function insertPerson(
  db: Knex,
  person: { email: string; name: string; passwordHash: string },
): Promise<string> {
  const { rows } = await db.raw<{ rows: [{ id: string }] }>(
    'insert into people (email, name, password_hash) values (:email, :name, :passwordHash) returning id',
    { ...person },
  );
  return rows[0].id;
}

/** Marks a set-up key as used; false when it was used before or never made. Holds the key until the transaction ends. */
export async function useSetUpKey(transaction: Knex.Transaction, key: { keyHash: string; at: Date }): Promise<boolean> {
  const result = await transaction.raw<{ rowCount: number }>(
    'update set_up_keys set used_at = :at where key_hash = :keyHash and used_at is null',
    key,
  );
  return result.rowCount === 1;
}

/** The newest link is the only one that works. */
export async function replaceSetUpKey(transaction: Knex.Transaction, keyHash: string): Promise<void> {
  await transaction.raw('delete from set_up_keys where used_at is null');
  await transaction.raw('insert into set_up_keys (key_hash) values (?)', [keyHash]);
}

export async function sessionStands(db: Knex, session: { id: string; at: Date }): Promise<boolean> {
  const { rows } = await db.raw<{ rows: { found: boolean }[] }>(
    'select exists (select 1 from sessions where sessions.sid = :id and sessions.expire > :at) as found',
    session,
  );
  return rows[0]?.found ?? false;
}

export async function deleteExpiredSessions(db: Knex, at: Date): Promise<void> {
  await db.raw('delete from sessions where expire < ?', [at]);
}
