import type { Knex } from 'knex';

/** An event as it stands in the table, everything in it that is hashed as text. */
export interface StoredEvent {
  readonly id: string;
  readonly teamId: string | null;
  /** null: it was written past the chain. */
  readonly position: number | null;
  readonly previousHash: string | null;
  readonly hash: string | null;
  readonly personId: string | null;
  readonly act: string;
  readonly subjectText: string;
  readonly requestId: string | null;
  readonly at: string;
}

export interface ChainHead {
  readonly teamId: string | null;
  readonly teamName: string | null;
  readonly events: number;
  readonly hash: string;
}

const EVENT = `
  select cast(audit_events.id as text) as id, audit_events.team_id as "teamId",
    cast(audit_events.position as integer) as position, audit_events.previous_hash as "previousHash", audit_events.hash,
    audit_events.person_id as "personId", audit_events.act, cast(audit_events.subject as text) as "subjectText",
    audit_events.request_id as "requestId",
    to_char(audit_events.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"') as at
  from audit_events`;

/** Every chain that has a head or an event, that outside of teams first; one whose head is gone counts no event. */
export async function listChainHeads(db: Knex): Promise<readonly ChainHead[]> {
  const { rows } = await db.raw<{ rows: ChainHead[] }>(
    `select held."teamId", teams.name as "teamName", cast(coalesce(audit_chains.events, 0) as integer) as events,
       coalesce(audit_chains.hash, repeat('0', 64)) as hash
     from (
       select audit_chains.team_id as "teamId" from audit_chains
       union select distinct audit_events.team_id from audit_events
     ) as held
     left join audit_chains on audit_chains.team_id is not distinct from held."teamId"
     left join teams on teams.id = held."teamId"
     order by teams.created_at nulls first, held."teamId"`,
  );
  return rows;
}

/** Said in the one way for which the index serves. */
function ofChain(teamId: string | null): string {
  return teamId === null ? 'audit_events.team_id is null' : 'audit_events.team_id = :teamId';
}

/** The next events of a chain after one, in its order; two share a place only where somebody has put one in. */
export async function listEventsAfter(
  db: Knex,
  after: { teamId: string | null; position: number; id: string; limit: number },
): Promise<readonly StoredEvent[]> {
  const { rows } = await db.raw<{ rows: StoredEvent[] }>(
    `${EVENT}
     where ${ofChain(after.teamId)} and audit_events.position is not null and audit_events.position >= :position
       and (audit_events.position, audit_events.id) > (:position, cast(:id as bigint))
     order by audit_events.position, audit_events.id limit :limit`,
    after,
  );
  return rows;
}

/** The first event of a chain that has no place in it. */
export async function findEventOutsideChain(db: Knex, teamId: string | null): Promise<StoredEvent | null> {
  const { rows } = await db.raw<{ rows: StoredEvent[] }>(
    `${EVENT}
     where ${ofChain(teamId)} and audit_events.position is null
     order by audit_events.id limit 1`,
    { teamId },
  );
  return rows[0] ?? null;
}
