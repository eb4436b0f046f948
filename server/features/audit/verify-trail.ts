import type { Knex } from 'knex';
import { type ChainHead, listChainHeads } from './chain-read-model.ts';
import { type BrokenLink, type KeptHead, verifyChain } from './verify-chain.ts';

export interface VerifiedChain {
  readonly head: ChainHead;
  /** null: every event is as it was written. */
  readonly broken: BrokenLink | null;
}

/**
 * Verifies every chain, one after the other.
 * @param kept heads that were written down earlier; one of a chain that is gone altogether breaks that chain
 */
export async function* verifyTrail(db: Knex, kept: readonly KeptHead[] = []): AsyncGenerator<VerifiedChain> {
  const heads = await listChainHeads(db);
  for (const head of heads) {
    const ofChain = kept.filter(({ teamId }) => teamId === head.teamId);
    yield { head, broken: await verifyChain(db, { head, kept: ofChain }) };
  }
  const gone = kept.filter(({ teamId }) => !heads.some((head) => head.teamId === teamId));
  for (const { teamId, events, hash } of gone) {
    const why = `The whole chain is gone: it held ${events} events.`;
    yield { head: { teamId, teamName: null, events, hash }, broken: { id: null, position: 1, at: null, why } };
  }
}
