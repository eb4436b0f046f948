import type { Knex } from 'knex';
import type { NoticeKind } from '#contract/notices.ts';

export interface NoticeToStore {
  readonly personId: string;
  readonly teamId: string | null;
  readonly kind: NoticeKind;
  readonly words: string;
  readonly path: string;
  readonly at: Date;
}

/** @returns the person's address when the notice is wanted; null when the person has that kind off or is not there */
export async function insertWantedNotice(transaction: Knex.Transaction, notice: NoticeToStore): Promise<string | null> {
  const { rows } = await transaction.raw<{ rows: { email: string }[] }>(
    `with wanted as (
       select people.id, people.email from people
       where people.id = :personId and not (cast(:kind as text) = any(people.notices_off))
     ), told as (
       insert into notices (person_id, team_id, kind, words, path, made_at)
       select wanted.id, :teamId, :kind, :words, :path, :at from wanted
     )
     select wanted.email from wanted`,
    { ...notice },
  );
  return rows[0]?.email ?? null;
}
