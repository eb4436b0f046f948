import type { Router } from 'express';
import * as contract from '#contract/members.ts';
import type { Deps } from '../../deps.ts';
import { mount } from '../../http/mount.ts';
import { personOf } from '../../http/person-of.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { changeMember, noSuchMember } from './change-member.ts';
import { endMemberSessions } from './end-member-sessions.ts';
import type { TeamParts } from './make-team.ts';
import { findMemberView, listMemberViews } from './member-read-model.ts';
import { presentMember } from './present-member.ts';
import { removeMember } from './remove-member.ts';
import { renameTeam } from './rename-team.ts';
import { startTeam } from './start-team.ts';

export function memberRoutes(router: Router, deps: Deps, parts: TeamParts): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({ by: personOf(request), requestId: request.requestId });

  mount(router, deps, contract.listMembers, async ({ params: { teamId } }, { actor }) => {
    const withEmail = actor.kind === 'person' && actor.roles.get(teamId.toLowerCase()) === 'lead';
    const now = deps.now();
    return { items: (await listMemberViews(db, teamId)).map((view) => presentMember(view, { withEmail, now })) };
  });
  mount(router, deps, contract.changeMember, async ({ params, body }, request) => {
    await changeMember(db, { ...params, role: body.role, lastDay: body.lastDay, ...act(request) });
    const view = await findMemberView(db, params);
    if (view === null) throw noSuchMember();
    return presentMember(view, { withEmail: true, now: deps.now() });
  });
  mount(router, deps, contract.removeMember, async ({ params }, request) => {
    await removeMember(db, { ...params, ...act(request) });
    return undefined;
  });
  mount(router, deps, contract.leaveTeam, async ({ params }, request) => {
    await removeMember(db, { ...params, personId: personOf(request), ...act(request) });
    return undefined;
  });
  mount(router, deps, contract.endMemberSessions, async ({ params }, request) => {
    await endMemberSessions(db, { ...params, ...act(request) });
    return undefined;
  });
  mount(router, deps, contract.makeTeam, async ({ body }, request) => ({
    teamId: await startTeam({ db, ...parts }, { name: body.name, ...act(request) }),
  }));
  mount(router, deps, contract.renameTeam, async ({ params, body }, request) => {
    await renameTeam(db, { ...params, ...body, ...act(request) });
    return undefined;
  });
}
