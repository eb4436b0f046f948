import type { Router } from 'express';
import * as contract from '#contract/team-data.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import { personOf } from '../../http/person-of.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { askExport } from './ask-export.ts';
import { askDeletion, stopDeletion } from './change-deletion.ts';
import { findWaitingDeletion } from './deletion-read-model.ts';
import { findExportView, listExportViews } from './export-read-model.ts';
import { openExport } from './open-export.ts';
import { presentDeletion } from './present-deletion.ts';
import { presentExport } from './present-export.ts';

export interface DataParts {
  /** @throws AppError at body.password when it is not the person's */
  requirePassword(given: { personId: string; password: string; at: Date }): Promise<unknown>;
}

/** All that the team has: taken out, or given up. */
export function dataRoutes(router: Router, deps: Deps, parts: DataParts): void {
  const { db, publicUrl } = deps;
  const act = (request: RequestContext) => ({
    personId: personOf(request),
    requestId: request.requestId,
    at: deps.now(),
  });

  mount(router, deps, contract.listExports, async ({ params: { teamId } }) => ({
    items: (await listExportViews(db, teamId)).map(presentExport),
  }));
  mount(router, deps, contract.askExport, async ({ params: { teamId } }, request) => {
    const exportId = await askExport(db, { teamId, ...act(request) });
    const view = await findExportView(db, { teamId, exportId });
    if (view === null) throw new AppError('not_found', 'There is no such export in this team.');
    return presentExport(view);
  });
  mount(router, deps, contract.getExport, ({ params }, request) => openExport(deps, { ...params, ...act(request) }));
  mount(router, deps, contract.getDeletion, async ({ params: { teamId } }) => {
    const waiting = await findWaitingDeletion(db, teamId);
    return { waiting: waiting === null ? null : presentDeletion(waiting) };
  });
  mount(router, deps, contract.askDeletion, async ({ params: { teamId }, body }, request) => {
    const by = act(request);
    await parts.requirePassword({ ...by, password: body.password });
    await askDeletion(db, { teamId, name: body.name, publicUrl, ...by });
    const waiting = await findWaitingDeletion(db, teamId);
    if (waiting === null) throw new AppError('wrong_state', 'The deletion was stopped meanwhile.');
    return presentDeletion(waiting);
  });
  mount(router, deps, contract.stopDeletion, async ({ params }, request) => {
    await stopDeletion(db, { ...params, publicUrl, ...act(request) });
    return undefined;
  });
}
