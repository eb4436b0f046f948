import type { Knex } from 'knex';
import { type ChainHead, listChainHeads } from './chain-read-model.ts';
import { type BrokenLink, type KeptHead, verifyChain } from './verify-chain.ts';

export interface VerifiedChain {
  readonly head: ChainHead;
  /** null: every event is as it was written. */
  readonly broken: BrokenLink | null;
}

/**
 * Verifies every chain, one after the other, all as they stood at one moment: a server that goes on writing meanwhile breaks none.
 * @param kept heads that were written down earlier; one of a chain that is gone altogether breaks that chain
 */
export async function* verifyTrail(db: Knex, kept: readonly KeptHead[] = []): AsyncGenerator<VerifiedChain> {
  const moment = await db.transaction({ isolationLevel: 'repeatable read', readOnly: true });
  try {
    const heads = await listChainHeads(moment);
    for (const head of heads) {
      const ofChain = kept.filter(({ teamId }) => teamId === head.teamId);
      yield { head, broken: await verifyChain(moment, { head, kept: ofChain }) };
    }
    yield* goneChains(heads, kept);
  } finally {
    await moment.rollback();
  }
}

function goneChains(heads: readonly ChainHead[], kept: readonly KeptHead[]): readonly VerifiedChain[] {
  const gone = kept.filter(({ teamId }) => !heads.some((head) => head.teamId === teamId));
  return gone.map(({ teamId, events, hash }) => {
    const why = `The whole chain is gone: it held ${events} events.`;
    return { head: { teamId, teamName: null, events, hash }, broken: { id: null, position: 1, at: null, why } };
  });
}
