import type { Knex } from 'knex';
import type { TokenScope } from '#contract/tokens.ts';

export async function insertToken(
  transaction: Knex.Transaction,
  token: {
    teamId: string;
    name: string;
    hash: string;
    scopes: readonly TokenScope[];
    personId: string;
    at: Date;
    expiresAt: Date;
  },
): Promise<string> {
  const { rows } = await transaction.raw<{ rows: [{ id: string }] }>(
    `insert into api_tokens (team_id, name, token_hash, scopes, made_by, made_at, expires_at)
     values (:teamId, :name, :hash, array(select jsonb_array_elements_text(cast(:scopes as jsonb))), :personId, :at, :expiresAt)
     returning id`,
    { ...token, scopes: JSON.stringify(token.scopes) },
  );
  return rows[0].id;
}

/** @returns the token's name; null when the team has no such token or it was revoked before */
export async function setTokenRevoked(
  transaction: Knex.Transaction,
  change: { teamId: string; tokenId: string; personId: string; at: Date },
): Promise<string | null> {
  const { rows } = await transaction.raw<{ rows: { name: string }[] }>(
    `update api_tokens set revoked_by = :personId, revoked_at = :at
     where team_id = :teamId and id = :tokenId and revoked_at is null returning name`,
    change,
  );
  return rows[0]?.name ?? null;
}

export interface KnownToken {
  readonly tokenId: string;
  readonly teamId: string;
  readonly personId: string;
  readonly scopes: readonly TokenScope[];
  readonly lastUsedAt: Date | null;
}

/** A token that holds now, and whose maker may still give it. */
export async function findValidToken(db: Knex, given: { hash: string; at: Date }): Promise<KnownToken | null> {
  const { rows } = await db.raw<{ rows: KnownToken[] }>(
    `select api_tokens.id as "tokenId", api_tokens.team_id as "teamId", api_tokens.made_by as "personId",
       to_jsonb(api_tokens.scopes) as scopes, api_tokens.last_used_at as "lastUsedAt"
     from api_tokens
     join memberships on memberships.team_id = api_tokens.team_id and memberships.person_id = api_tokens.made_by
       and memberships.role = 'lead'
     where api_tokens.token_hash = :hash and api_tokens.revoked_at is null and api_tokens.expires_at > :at`,
    given,
  );
  return rows[0] ?? null;
}

export async function setTokenUsed(db: Knex, use: { tokenId: string; at: Date }): Promise<void> {
  await db.raw('update api_tokens set last_used_at = :at where id = :tokenId', use);
}
