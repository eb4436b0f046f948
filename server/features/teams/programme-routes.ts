import type { Router } from 'express';
import * as contract from '#contract/programmes.ts';
import type { Deps } from '../../deps.ts';
import { closedTo } from '../../http/closed-to.ts';
import { mount } from '../../http/mount.ts';
import { personOf } from '../../http/person-of.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { makeProgramme, noSuchProgramme, renameProgramme, setProgrammeMembers } from './change-programme.ts';
import type { TeamParts } from './make-team.ts';
import { findProgrammeView, listProgrammeViews } from './programme-read-model.ts';

export function programmeRoutes(router: Router, deps: Deps, { startBrief }: TeamParts): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({ by: personOf(request), requestId: request.requestId });
  const presented = async (key: { teamId: string; programmeId: string }) => {
    const view = await findProgrammeView(db, key);
    if (view === null) throw noSuchProgramme();
    return view;
  };

  mount(router, deps, contract.listProgrammes, async ({ params: { teamId } }, { actor }) => {
    const programmes = await listProgrammeViews(db, teamId);
    return { items: programmes.filter(({ id }) => !closedTo(actor).includes(id)) };
  });
  mount(router, deps, contract.makeProgramme, async ({ params: { teamId }, body }, request) => {
    const programmeId = await makeProgramme({ db, startBrief }, { teamId, ...body, ...act(request) });
    return await presented({ teamId, programmeId });
  });
  mount(router, deps, contract.renameProgramme, async ({ params, body }, request) => {
    await renameProgramme(db, { ...params, ...body, ...act(request) });
    return await presented(params);
  });
  mount(router, deps, contract.setProgrammeMembers, async ({ params, body }, request) => {
    await setProgrammeMembers(db, { ...params, ...body, ...act(request) });
    return await presented(params);
  });
}
