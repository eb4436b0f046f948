import type { Knex } from 'knex';
import type { TokenScope } from '#contract/tokens.ts';

export interface TokenView {
  readonly id: string;
  readonly name: string;
  readonly scopes: readonly TokenScope[];
  readonly madeBy: string;
  readonly madeAt: Date;
  readonly expiresAt: Date;
  readonly lastUsedAt: Date | null;
  readonly revokedAt: Date | null;
}

const TOKEN = `
  select api_tokens.id, api_tokens.name, to_jsonb(api_tokens.scopes) as scopes, people.name as "madeBy",
    api_tokens.made_at as "madeAt", api_tokens.expires_at as "expiresAt", api_tokens.last_used_at as "lastUsedAt",
    api_tokens.revoked_at as "revokedAt"
  from api_tokens join people on people.id = api_tokens.made_by`;

export async function listTokenViews(db: Knex, teamId: string): Promise<readonly TokenView[]> {
  const { rows } = await db.raw<{ rows: TokenView[] }>(
    `${TOKEN} where api_tokens.team_id = ? order by api_tokens.made_at desc, api_tokens.id`,
    [teamId],
  );
  return rows;
}

/** `null` when the team has no such token. */
export async function findTokenView(db: Knex, key: { teamId: string; tokenId: string }): Promise<TokenView | null> {
  const { rows } = await db.raw<{ rows: TokenView[] }>(
    `${TOKEN} where api_tokens.team_id = :teamId and api_tokens.id = :tokenId`,
    key,
  );
  return rows[0] ?? null;
}
