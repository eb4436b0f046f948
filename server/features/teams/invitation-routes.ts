import type { Router } from 'express';
import type { Session } from '#contract/accounts.ts';
import * as contract from '#contract/invitations.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import { personOf } from '../../http/person-of.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { type AcceptParts, acceptAsNewPerson, acceptOwnInvitation } from './accept-invitation.ts';
import { hashOfInvitationKey } from './invitation-key.ts';
import {
  findInvitationView,
  findOpenInvitation,
  listInvitationsTo,
  listInvitationViews,
} from './invitation-read-model.ts';
import { invite, resendInvitation, revokeInvitation } from './invite.ts';
import { presentInvitation } from './present-invitation.ts';

export interface InvitationParts extends AcceptParts {
  readSession(personId: string): Promise<Session>;
}

export function invitationRoutes(router: Router, deps: Deps, parts: InvitationParts): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({ by: personOf(request), requestId: request.requestId, at: deps.now() });
  const presented = async (key: { teamId: string; invitationId: string }) => {
    const view = await findInvitationView(db, key);
    if (view === null) throw new AppError('not_found', 'There is no such invitation in this team.');
    return presentInvitation(view, deps.now());
  };

  mount(router, deps, contract.listInvitations, async ({ params: { teamId } }) => ({
    items: (await listInvitationViews(db, teamId)).map((view) => presentInvitation(view, deps.now())),
  }));
  mount(router, deps, contract.invite, async ({ params: { teamId }, body }, request) => {
    const invitationId = await invite(deps, { teamId, ...body, ...act(request) });
    return await presented({ teamId, invitationId });
  });
  mount(router, deps, contract.resendInvitation, async ({ params }, request) => {
    await resendInvitation(deps, { ...params, ...act(request) });
    return await presented(params);
  });
  mount(router, deps, contract.revokeInvitation, async ({ params }, request) => {
    await revokeInvitation(db, { ...params, ...act(request) });
    return await presented(params);
  });

  mount(router, deps, contract.openInvitation, async ({ body }) => {
    const found = await findOpenInvitation(db, { keyHash: hashOfInvitationKey(body.key), at: deps.now() });
    if (found === null)
      throw new AppError('link_not_valid', 'This invitation was used, taken back or replaced, or has expired.');
    return found;
  });
  mount(router, deps, contract.acceptAsNewPerson, async ({ body }, { session, requestId }) => {
    const given = { ...body, requestId, at: deps.now() };
    const personId = await acceptAsNewPerson({ db, makePerson: parts.makePerson }, given);
    await session.begin(personId);
    return await parts.readSession(personId);
  });
  mount(router, deps, contract.listOwnInvitations, async (_input, request) => ({
    items: await listInvitationsTo(db, { personId: personOf(request), at: deps.now() }),
  }));
  mount(router, deps, contract.acceptOwnInvitation, async ({ params }, request) => {
    const personId = personOf(request);
    await acceptOwnInvitation(db, { ...params, personId, requestId: request.requestId, at: deps.now() });
    return await parts.readSession(personId);
  });
}
