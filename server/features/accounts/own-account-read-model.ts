import type { Knex } from 'knex';
import type { Notice, NoticeKind } from '#contract/notices.ts';
import type { Account } from '#contract/own-account.ts';

export async function readAccount(db: Knex, personId: string): Promise<Account | null> {
  const { rows } = await db.raw<{
    rows: { name: string; email: string; on: boolean; left: number; off: NoticeKind[] }[];
  }>(
    `select people.name, people.email, people.two_factor_since is not null as on, to_jsonb(people.notices_off) as off,
       (select count(*)::integer from recovery_codes
        where recovery_codes.person_id = people.id and recovery_codes.used_at is null) as left
     from people where people.id = ?`,
    [personId],
  );
  const [row] = rows;
  if (row === undefined) return null;
  const { name, email, on, left, off } = row;
  return { name, email, twoFactor: { on, recoveryCodesLeft: left }, noticesOff: off };
}

export interface SessionView {
  readonly id: string;
  readonly endsAt: Date;
  readonly about: { readonly beganAt: string; readonly address: string | null; readonly browser: string | null } | null;
  readonly current: boolean;
}

/** @param key.sid of the session that asks */
export async function listSessionViews(
  db: Knex,
  key: { personId: string; sid: string; at: Date },
): Promise<readonly SessionView[]> {
  const { rows } = await db.raw<{ rows: SessionView[] }>(
    `select sessions.id, sessions.expire as "endsAt", sessions.sess -> 'about' as about, sessions.sid = :sid as current
     from sessions where sessions.person_id = :personId and sessions.expire > :at
     order by sessions.expire desc, sessions.id`,
    key,
  );
  return rows;
}

const MOST_NOTICES = 50;

export async function listNotices(db: Knex, personId: string): Promise<{ items: Notice[]; unread: number }> {
  const { rows } = await db.raw<{ rows: (Omit<Notice, 'madeAt'> & { madeAt: Date; unread: number })[] }>(
    `select notices.id, notices.kind, notices.words, notices.path, notices.made_at as "madeAt",
       notices.read_at is not null as read,
       (count(*) filter (where notices.read_at is null) over ())::integer as unread
     from notices where notices.person_id = ?
     order by notices.made_at desc, notices.id limit ${MOST_NOTICES}`,
    [personId],
  );
  const items = rows.map(({ id, kind, words, path, madeAt, read }) => ({
    ...{ id, kind, words, path, read },
    madeAt: madeAt.toISOString(),
  }));
  return { items, unread: rows[0]?.unread ?? 0 };
}
