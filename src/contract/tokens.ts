import * as z from 'zod/mini';
import { empty, endpoint, json, none, ordinary } from './endpoint.ts';

/** What a token may do, in the words in which it is chosen. */
export const tokenScopes = ['weather:upload', 'weather:read', 'results:read'] as const;
export const TokenScope = z.enum(tokenScopes);
export type TokenScope = z.infer<typeof TokenScope>;

export const LONGEST_TOKEN_DAYS = 366;

export const ApiToken = z.object({
  id: z.uuid(),
  name: z.string(),
  scopes: z.array(TokenScope),
  madeBy: z.string(),
  madeAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  /** To the minute; null when it was never used. */
  lastUsedAt: z.nullable(z.iso.datetime()),
  state: z.enum(['valid', 'expired', 'revoked']),
});
export type ApiToken = z.infer<typeof ApiToken>;

const TeamParams = z.strictObject({ teamId: z.uuid() });

export const listTokens = endpoint({
  method: 'GET',
  path: '/api/teams/:teamId/tokens',
  summary: "The team's API tokens, newest first; never the tokens themselves.",
  params: TeamParams,
  query: empty,
  body: none,
  response: json(z.object({ items: z.array(ApiToken) })),
  errors: [],
  allow: 'teams.tokens',
  limits: ordinary,
});

export const makeToken = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/tokens',
  summary: 'Make an API token for a program. The answer shows it once; only its hash is kept.',
  params: TeamParams,
  query: empty,
  body: json(
    z.strictObject({
      name: z
        .string()
        .check(z.trim(), z.minLength(1, 'Name the token.'), z.maxLength(100, 'Use 100 characters or fewer.')),
      scopes: z
        .array(TokenScope)
        .check(z.minLength(1, 'Choose what the token may do.'), z.maxLength(tokenScopes.length)),
      days: z
        .int('Give whole days.')
        .check(
          z.gte(1, 'Give at least one day.'),
          z.lte(LONGEST_TOKEN_DAYS, `Give ${LONGEST_TOKEN_DAYS} days at most.`),
        ),
    }),
  ),
  response: json(z.object({ token: z.string(), made: ApiToken })),
  errors: [],
  allow: 'teams.tokens',
  limits: { ...ordinary, perMinute: 20 },
});

export const revokeToken = endpoint({
  method: 'DELETE',
  path: '/api/teams/:teamId/tokens/:tokenId',
  summary: 'Revoke an API token at once. Its record stays.',
  params: z.strictObject({ teamId: z.uuid(), tokenId: z.uuid() }),
  query: empty,
  body: none,
  response: json(ApiToken),
  errors: [],
  allow: 'teams.tokens',
  limits: ordinary,
});
