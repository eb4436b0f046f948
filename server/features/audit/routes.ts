import type { Router } from 'express';
import { exportAuditCsv, exportAuditJson, listAuditEvents } from '#contract/audit.ts';
import type { Deps } from '../../deps.ts';
import { mount } from '../../http/mount.ts';
import { takerOf } from '../../http/taker-of.ts';
import { findChain, listAuditPeople, listEventsBefore } from './audit-read-model.ts';
import { exportTrail } from './export-trail.ts';
import { presentAuditEvent } from './present-audit-event.ts';

export function auditRoutes(router: Router, deps: Deps): void {
  const { db } = deps;

  mount(router, deps, listAuditEvents, async ({ params: { teamId }, query }) => {
    const { before = null, limit, ...filter } = query;
    // One more than the page holds says whether there is another.
    const [views, people, chain] = await Promise.all([
      listEventsBefore(db, { teamId, filter, before, limit: limit + 1 }),
      listAuditPeople(db, teamId),
      findChain(db, teamId),
    ]);
    const shown = views.slice(0, limit);
    const next = views.length > limit ? (shown.at(-1)?.position ?? null) : null;
    return { items: shown.map(presentAuditEvent), next, people: [...people], chain };
  });
  mount(router, deps, exportAuditCsv, async ({ params, query }, request) =>
    exportTrail(db, { ...params, filter: query, format: 'csv', taker: takerOf(request) }),
  );
  mount(router, deps, exportAuditJson, async ({ params, query }, request) =>
    exportTrail(db, { ...params, filter: query, format: 'json', taker: takerOf(request) }),
  );
}
