import type { Knex } from 'knex';
import type { TokenScope } from '#contract/tokens.ts';
import { inTransaction } from '../../db/in-transaction.ts';
import { recordAuditEvent } from '../../db/record-audit-event.ts';
import { insertToken } from './token-store.ts';
import { hashOfToken, newToken } from './token-text.ts';

const DAY_MS = 24 * 3_600_000;

/** Makes a token for a program. @returns the token itself, which is kept nowhere, and the id of its record */
export async function makeToken(
  db: Knex,
  order: {
    teamId: string;
    name: string;
    scopes: readonly TokenScope[];
    days: number;
    personId: string;
    requestId: string | null;
    at: Date;
  },
): Promise<{ token: string; tokenId: string }> {
  const { teamId, name, personId, requestId, at } = order;
  const token = newToken();
  const hash = hashOfToken(token);
  if (hash === null) throw new Error('a new token is not one of ours');
  const scopes = [...new Set(order.scopes)];
  const expiresAt = new Date(at.getTime() + order.days * DAY_MS);
  return await inTransaction(db, async (transaction) => {
    const tokenId = await insertToken(transaction, { teamId, name, hash, scopes, personId, at, expiresAt });
    await recordAuditEvent(transaction, {
      teamId,
      personId,
      act: 'token made',
      subject: { tokenId, name, scopes, expiresAt },
      requestId,
    });
    return { token, tokenId };
  });
}
