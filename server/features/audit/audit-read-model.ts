import type { Knex } from 'knex';
import { type AuditFilter, auditActs } from '#contract/audit.ts';

export interface AuditEventView {
  readonly position: number;
  /** UTC to the microsecond, as it is hashed. */
  readonly at: string;
  readonly personId: string | null;
  readonly personName: string | null;
  readonly act: string;
  readonly subject: Readonly<Record<string, unknown>>;
  /** The same as the text that is hashed. */
  readonly subjectText: string;
  readonly requestId: string | null;
  readonly previousHash: string;
  readonly hash: string;
}

const EVENT = `
  select cast(audit_events.position as integer) as position,
    to_char(audit_events.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"') as at,
    audit_events.person_id as "personId", people.name as "personName", audit_events.act, audit_events.subject,
    cast(audit_events.subject as text) as "subjectText", audit_events.request_id as "requestId",
    audit_events.previous_hash as "previousHash", audit_events.hash
  from audit_events left join people on people.id = audit_events.person_id`;

/** Newest first, before a place in the chain. */
export async function listEventsBefore(
  db: Knex,
  asked: { teamId: string; filter: AuditFilter; before: number | null; limit: number },
): Promise<readonly AuditEventView[]> {
  const { teamId, filter, before, limit } = asked;
  const narrowed = narrow(filter);
  const { rows } = await db.raw<{ rows: AuditEventView[] }>(
    `${EVENT}
     where audit_events.team_id = :teamId ${before === null ? '' : 'and audit_events.position < :before'} ${narrowed.sql}
       and audit_events.position is not null
     order by audit_events.position desc limit :limit`,
    { teamId, before: before ?? 0, limit, ...narrowed.values },
  );
  return rows;
}

/** Oldest first, after a place in the chain. */
export async function listEventsFrom(
  db: Knex,
  asked: { teamId: string; filter: AuditFilter; after: number; limit: number },
): Promise<readonly AuditEventView[]> {
  const { teamId, filter, after, limit } = asked;
  const narrowed = narrow(filter);
  const { rows } = await db.raw<{ rows: AuditEventView[] }>(
    `${EVENT}
     where audit_events.team_id = :teamId and audit_events.position > :after ${narrowed.sql}
     order by audit_events.position limit :limit`,
    { teamId, after, limit, ...narrowed.values },
  );
  return rows;
}

/** Each choice as a condition; a filter that is not chosen leaves no trace in the statement. */
function narrow({ from, until, personId, kind, object }: AuditFilter): {
  sql: string;
  values: Record<string, string | string[]>;
} {
  const conditions: string[] = [];
  const values: Record<string, string | string[]> = {};
  const add = (condition: string, name: string, value: string | string[]): void => {
    conditions.push(`and ${condition}`);
    values[name] = value;
  };
  if (from !== undefined) add(`audit_events.at >= cast(:from as date) at time zone 'UTC'`, 'from', from);
  if (until !== undefined) add(`audit_events.at < (cast(:until as date) + 1) at time zone 'UTC'`, 'until', until);
  if (personId !== undefined) add('audit_events.person_id = :personId', 'personId', personId);
  if (kind !== undefined) add('audit_events.act = any(:acts)', 'acts', [...auditActs[kind]]);
  if (object)
    add(`position(lower(:object) in lower(cast(audit_events.subject as text))) > 0`, 'object', inJson(object));
  return { sql: conditions.join(' '), values };
}

/** Letters as they stand in the text of JSON. */
function inJson(text: string): string {
  return JSON.stringify(text).slice(1, -1);
}

/** Everybody who did something in the team, by name; one look at an index for each, however long the trail. */
export async function listAuditPeople(db: Knex, teamId: string): Promise<readonly { id: string; name: string }[]> {
  const { rows } = await db.raw<{ rows: { id: string; name: string }[] }>(
    `select people.id, people.name
     from people cross join lateral (
       select 1 from audit_events where audit_events.team_id = ? and audit_events.person_id = people.id limit 1
     ) as event
     order by people.name, people.id`,
    [teamId],
  );
  return rows;
}

/** Length and last hash of the team's chain; null before its first event. */
export async function findChain(db: Knex, teamId: string): Promise<{ events: number; hash: string } | null> {
  const { rows } = await db.raw<{ rows: { events: number; hash: string }[] }>(
    `select cast(audit_chains.events as integer) as events, audit_chains.hash from audit_chains where audit_chains.team_id = ?`,
    [teamId],
  );
  return rows[0] ?? null;
}
