import type { Router } from 'express';
import { listTokens, makeToken as makeTokenEndpoint, revokeToken as revokeTokenEndpoint } from '#contract/tokens.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { makeToken } from './make-token.ts';
import { presentToken } from './present-token.ts';
import { revokeToken } from './revoke-token.ts';
import { findTokenView, listTokenViews } from './token-read-model.ts';

export function teamsRoutes(router: Router, deps: Deps): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({
    personId: personOf(request),
    requestId: request.requestId,
    at: deps.now(),
  });
  const presented = async (key: { teamId: string; tokenId: string }) => {
    const view = await findTokenView(db, key);
    if (view === null) throw new AppError('not_found', 'There is no such token in this team.');
    return presentToken(view, deps.now());
  };

  mount(router, deps, listTokens, async ({ params: { teamId } }) => ({
    items: (await listTokenViews(db, teamId)).map((view) => presentToken(view, deps.now())),
  }));
  mount(router, deps, makeTokenEndpoint, async ({ params: { teamId }, body }, request) => {
    const { token, tokenId } = await makeToken(db, { teamId, ...body, ...act(request) });
    return { token, made: await presented({ teamId, tokenId }) };
  });
  mount(router, deps, revokeTokenEndpoint, async ({ params }, request) => {
    await revokeToken(db, { ...params, ...act(request) });
    return await presented(params);
  });
}

/** Every rule of this feature lets only people through. */
function personOf({ actor }: RequestContext): string {
  if (actor.kind !== 'person') throw new AppError('not_signed_in', 'Sign in first.');
  return actor.personId;
}
