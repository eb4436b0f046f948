import type { Knex } from 'knex';
import type { TokenActor } from '../../http/request-context.ts';
import { findValidToken, setTokenUsed } from './token-store.ts';
import { hashOfToken } from './token-text.ts';

/** A token that is used all the time is written down once a minute. */
const NOTE_EVERY_MS = 60_000;

/** Whom a token stands for; null when it does not hold. */
export async function findToken(db: Knex, given: { token: string; at: Date }): Promise<TokenActor | null> {
  const hash = hashOfToken(given.token);
  const known = hash === null ? null : await findValidToken(db, { hash, at: given.at });
  if (known === null) return null;
  const { tokenId, teamId, personId, scopes, lastUsedAt } = known;
  if (lastUsedAt === null || given.at.getTime() - lastUsedAt.getTime() >= NOTE_EVERY_MS) {
    await setTokenUsed(db, { tokenId, at: given.at });
  }
  return { kind: 'token', tokenId, teamId, personId, scopes };
}
