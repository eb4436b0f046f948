import { createHash } from 'node:crypto';

/** An event as it is hashed: text as PostgreSQL writes it, so that nothing is lost on the way through a number or a date. */
export interface HashedEvent {
  readonly previousHash: string;
  readonly position: number;
  readonly teamId: string | null;
  readonly personId: string | null;
  readonly act: string;
  /** The subject as text of PostgreSQL's jsonb: keys by length and then by bytes, one space after each colon and comma. */
  readonly subjectText: string;
  readonly requestId: string | null;
  /** UTC to the microsecond: 2027-03-31T12:00:00.000000Z. */
  readonly at: string;
}

/** What stands before the first event of a chain. */
export const NO_HASH = '0'.repeat(64);

/**
 * The one form in which an event is hashed: a JSON array of the hash before it, its place in the chain, team, person, act, subject,
 * request and time, in this order, with a space after each comma, as UTF-8. The database makes the same text from its own row when
 * a transaction commits (`audit_event_hash`, migrations/0010-audit-chain.ts); this one takes nothing from there, so that a
 * database whose function was changed is found out.
 */
export function canonicalEvent(event: HashedEvent): string {
  const { previousHash, position, teamId, personId, act, subjectText, requestId, at } = event;
  const before = [previousHash, position, teamId, personId, act].map((part) => JSON.stringify(part));
  const after = [requestId, at].map((part) => JSON.stringify(part));
  return `[${[...before, subjectText, ...after].join(', ')}]`;
}

/** SHA-256 of the canonical form, hexadecimal. */
export function hashOfEvent(event: HashedEvent): string {
  return createHash('sha256').update(canonicalEvent(event), 'utf8').digest('hex');
}
