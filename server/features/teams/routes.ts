import type { Router } from 'express';
import type { Session } from '#contract/accounts.ts';
import { listMails } from '#contract/mails.ts';
import { listTokens, makeToken as makeTokenEndpoint, revokeToken as revokeTokenEndpoint } from '#contract/tokens.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import { personOf } from '../../http/person-of.ts';
import type { RequestContext } from '../../http/request-context.ts';
import type { AcceptParts } from './accept-invitation.ts';
import { type DataParts, dataRoutes } from './data-routes.ts';
import { invitationRoutes } from './invitation-routes.ts';
import { listWaitingMails } from './mail-read-model.ts';
import type { TeamParts } from './make-team.ts';
import { makeToken } from './make-token.ts';
import { memberRoutes } from './member-routes.ts';
import { presentToken } from './present-token.ts';
import { programmeRoutes } from './programme-routes.ts';
import { revokeToken } from './revoke-token.ts';
import { findTokenView, listTokenViews } from './token-read-model.ts';

/** What teams need of other features, handed in where the server is wired. */
export interface TeamsParts extends TeamParts, AcceptParts, DataParts {
  readSession(personId: string): Promise<Session>;
}

export function teamsRoutes(router: Router, deps: Deps, parts: TeamsParts): void {
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
  mount(router, deps, listMails, async ({ params: { teamId } }) => ({
    items: (await listWaitingMails(db, teamId)).map((mail) => ({ ...mail, madeAt: mail.madeAt.toISOString() })),
    sends: deps.sendsMail,
  }));
  memberRoutes(router, deps, parts);
  invitationRoutes(router, deps, parts);
  programmeRoutes(router, deps, parts);
  dataRoutes(router, deps, parts);
}
