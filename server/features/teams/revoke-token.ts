import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { setTokenRevoked } from './token-store.ts';

/** Takes a token back at once; doing it again changes nothing. */
export async function revokeToken(
  db: Knex,
  change: { teamId: string; tokenId: string; personId: string; requestId: string | null; at: Date },
): Promise<void> {
  const { teamId, tokenId, personId, requestId } = change;
  await inTransaction(db, async (transaction) => {
    const name = await setTokenRevoked(transaction, change);
    if (name === null) return;
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'token revoked',
      subject: { tokenId, name },
      requestId,
    });
  });
}
