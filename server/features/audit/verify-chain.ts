import type { Knex } from 'knex';
import { hashOfEvent, NO_HASH } from './canonical-event.ts';
import { type ChainHead, findEventOutsideChain, listEventsAfter, type StoredEvent } from './chain-read-model.ts';

/** A chain as somebody wrote it down earlier, outside of the database. */
export interface KeptHead {
  readonly teamId: string | null;
  readonly events: number;
  readonly hash: string;
}

export interface BrokenLink {
  /** Of the row, where there is one. */
  readonly id: string | null;
  readonly position: number | null;
  readonly at: string | null;
  readonly why: string;
}

const AT_ONCE = 1000;

/**
 * Walks a chain from its first event to its head and looks at every hash anew. Whoever may write everything in the database could
 * also write a whole chain anew: only a head that was kept elsewhere shows that.
 * @returns the first row that is not as it was written; null when the chain is whole
 */
export async function verifyChain(
  db: Knex,
  { head, kept = [] }: { head: ChainHead; kept?: readonly KeptHead[] },
): Promise<BrokenLink | null> {
  const { teamId } = head;
  const hashes = new Map(kept.map(({ events, hash }) => [events, hash]));
  let position = 0;
  let hash = NO_HASH;
  let id = '0';
  for (;;) {
    const events = await listEventsAfter(db, { teamId, position, id, limit: AT_ONCE });
    for (const event of events) {
      const why = faultOf(event, { position: position + 1, previousHash: hash });
      if (why !== null) return broken(event, why);
      position += 1;
      id = event.id;
      hash = event.hash ?? NO_HASH;
      const known = hashes.get(position);
      if (known !== undefined && known !== hash)
        return broken(event, 'It is not the event that stood here when the head was kept.');
    }
    if (events.length < AT_ONCE) break;
  }
  return endFault({ head, position, hash, kept }) ?? (await outsideFault(db, teamId));
}

function faultOf(event: StoredEvent, expected: { position: number; previousHash: string }): string | null {
  const { position, previousHash, hash } = event;
  if (position === null || previousHash === null || hash === null) return 'It has no place in the chain.';
  if (position > expected.position) return `Event ${expected.position}, which stood before it, is gone.`;
  if (position < expected.position) return 'It was put in: another event has its place in the chain.';
  if (previousHash !== expected.previousHash) return 'It does not follow from the event before it.';
  if (hashOfEvent({ ...event, position, previousHash }) !== hash) return 'What it says is not what was written.';
  return null;
}

/** What only shows at the end: events that are gone from it, or were put behind it. */
function endFault(end: {
  head: ChainHead;
  position: number;
  hash: string;
  kept: readonly KeptHead[];
}): BrokenLink | null {
  const { head, position, hash, kept } = end;
  const most = Math.max(head.events, ...kept.map(({ events }) => events));
  const at = { id: null, at: null };
  if (position < most) return { ...at, position: position + 1, why: `It is gone: the chain held ${most} events.` };
  if (position > head.events)
    return { ...at, position: head.events + 1, why: 'It was put in behind the head of the chain.' };
  if (hash !== head.hash) return { ...at, position, why: 'It is not the event with which the chain ends.' };
  return null;
}

async function outsideFault(db: Knex, teamId: string | null): Promise<BrokenLink | null> {
  const event = await findEventOutsideChain(db, teamId);
  return event === null ? null : broken(event, 'It was put in: it has no place in the chain.');
}

function broken({ id, position, at }: StoredEvent, why: string): BrokenLink {
  return { id, position, at, why };
}
