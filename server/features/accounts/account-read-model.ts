import type { Knex } from 'knex';

export interface PersonInSession {
  readonly id: string;
  readonly name: string;
  readonly email: string;
}

export async function findPerson(db: Knex, personId: string): Promise<PersonInSession | null> {
  const { rows } = await db.raw<{ rows: PersonInSession[] }>(
    'select people.id, people.name, people.email from people where people.id = ?',
    [personId],
  );
  return rows[0] ?? null;
}
