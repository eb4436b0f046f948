import type { Knex } from 'knex';
import type { AuditAct } from '#contract/audit.ts';

export interface AuditEvent {
  readonly teamId: string | null;
  readonly personId: string | null;
  /** What was done, in the words of the closed list. */
  readonly act: AuditAct;
  readonly subject: Readonly<Record<string, unknown>>;
  readonly requestId: string | null;
}

/**
 * Writes what was done into the trail that nobody can change, in the transaction that does it. The database chains it to the event
 * before when the transaction commits (migrations/0010-audit-chain.ts), so an event may be written at any point of it.
 */
export async function recordAuditEvent(transaction: Knex.Transaction, event: AuditEvent): Promise<void> {
  await transaction.raw(
    `insert into audit_events (team_id, person_id, act, subject, request_id)
     values (:teamId, :personId, :act, cast(:subject as jsonb), :requestId)`,
    { ...event, subject: JSON.stringify(event.subject) },
  );
}
