import { createHash, randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import { inTransaction } from '../../db/in-transaction.ts';
import { anyTeamExists } from '../teams/team-read-model.ts';
import { replaceSetUpKey } from './account-store.ts';

/** The key itself is shown once and never stored. */
export function hashOfSetUpKey(key: string): string {
  return createHash('sha256').update(key).digest('hex');
}

/**
 * Makes the one-time key with which the first team and its lead are made; links that were not used stop working.
 * @returns the path of its page, `/set-up/KEY`; null once a team exists
 */
export async function makeSetUpKey(db: Knex): Promise<string | null> {
  const key = randomBytes(32).toString('base64url');
  return inTransaction(db, async (transaction) => {
    if (await anyTeamExists(transaction)) return null;
    await replaceSetUpKey(transaction, hashOfSetUpKey(key));
    return `/set-up/${key}`;
  });
}
