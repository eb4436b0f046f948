import type { ApiToken } from '#contract/tokens.ts';
import type { TokenView } from './token-read-model.ts';

export function presentToken(view: TokenView, now: Date): ApiToken {
  const { id, name, scopes, madeBy, madeAt, expiresAt, lastUsedAt, revokedAt } = view;
  return {
    id,
    name,
    scopes: [...scopes],
    madeBy,
    madeAt: madeAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    lastUsedAt: lastUsedAt?.toISOString() ?? null,
    state: revokedAt !== null ? 'revoked' : expiresAt <= now ? 'expired' : 'valid',
  };
}
