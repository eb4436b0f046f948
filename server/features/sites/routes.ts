import type { Router } from 'express';
import {
  addSiteImportRows as addRowsEndpoint,
  checkSiteImport as checkImportEndpoint,
  exportSites as exportEndpoint,
  finishSiteImport as finishImportEndpoint,
  listSiteImports,
  startSiteImport as startImportEndpoint,
  undoSiteImport as undoImportEndpoint,
} from '#contract/site-imports.ts';
import { getGround, getSite, setSiteDuty as setDutyEndpoint } from '#contract/site-record.ts';
import {
  changeSite as changeEndpoint,
  FilterCounts,
  listSites,
  makeSite as makeEndpoint,
  moveSite as moveEndpoint,
  removeSites as removeEndpoint,
  type Site,
  siteFlags,
} from '#contract/sites.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { makeKeptAnswers } from '../../http/kept-answers.ts';
import { type Handler, mount } from '../../http/mount.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { takerOf } from '../../http/taker-of.ts';
import { programmeExists } from '../briefs/version-read-model.ts';
import { changeSite } from './change-site.ts';
import { exportSites } from './export-sites.ts';
import { addSiteImportRows, checkSiteImport, finishSiteImport, startSiteImport } from './import-sites.ts';
import { makeSite, type SiteParts, type SiteTableParts } from './make-site.ts';
import { FIGURE_SORTS, isOf, pageOfSites } from './page-of-sites.ts';
import { presentImport, presentImportCheck, presentSite, presentSiteChange, presentWater } from './present-site.ts';
import { rankCandidates } from './rank-candidates.ts';
import { removeSites } from './remove-sites.ts';
import { makeSiteResolver, type ResolvedSite, sitesOfProgramme } from './resolved-sites-read-model.ts';
import { setSiteDuty } from './set-site-duty.ts';
import { groundAt } from './site-ground.ts';
import { listSiteImportViews } from './site-import-read-model.ts';
import {
  findSiteRecord,
  listAskedGates,
  listSiteChanges,
  listSiteDuties,
  listStationsOfTeam,
} from './site-read-model.ts';
import { undoSiteImport } from './undo-site-import.ts';

interface ProgrammeKey {
  readonly teamId: string;
  readonly programmeId: string;
}
interface SiteKey extends ProgrammeKey {
  readonly siteId: string;
}

export function sitesRoutes(router: Router, deps: Deps, parts: SiteParts & SiteTableParts): void {
  const { db } = deps;
  const { relief } = parts;
  const act = (request: RequestContext) => ({
    personId: personOf(request),
    requestId: request.requestId,
    at: deps.now(),
  });
  const presented = async (key: SiteKey): Promise<Site> => {
    const [row, stations] = await Promise.all([findSiteRecord(db, key), listStationsOfTeam(db, key.teamId)]);
    return presentSite(makeSiteResolver(stations)(found(row)));
  };
  const mustExist = async (key: ProgrammeKey): Promise<void> => {
    if (!(await programmeExists(db, key))) throw new AppError('not_found', 'There is no such programme in this team.');
  };

  const table: Handler<typeof listSites> = async ({ params, query }) => {
    await mustExist(params);
    const sites = await sitesOfProgramme(db, params);
    const figuresUnder = (some: readonly ResolvedSite[]) =>
      parts.figuresOfSites({ ...params, briefId: query.brief, sites: some });
    // Figures of every site only where the order depends on them.
    const all = FIGURE_SORTS.includes(query.sort) ? await figuresUnder(sites) : undefined;
    const { items, ...page } = pageOfSites(sites, query, all);
    const figures = all ?? (await figuresUnder(items));
    const filters = ['to settle', 'chosen', ...siteFlags] as const;
    const counts = Object.fromEntries(filters.map((name) => [name, sites.filter((site) => isOf(site, name)).length]));
    return {
      items: items.map((site) => ({ ...presentSite(site), figures: figures.get(site.id) ?? null })),
      page: query.page,
      ...page,
      counts: { all: sites.length, filters: FilterCounts.parse(counts) },
    };
  };
  mount(router, deps, listSites, table, makeKeptAnswers());
  mount(router, deps, getSite, async ({ params }) => recordOf(params));
  mount(router, deps, makeEndpoint, async ({ params, body }, request) => {
    const siteId = await makeSite({ db, ...parts }, { ...params, ...body, ...act(request) });
    return await presented({ ...params, siteId });
  });
  mount(router, deps, changeEndpoint, async ({ params, body: { revision, ...patch } }, request) => {
    await changeSite({ db, ...parts }, { ...params, revision, patch, ...act(request) });
    return await presented(params);
  });
  mount(router, deps, moveEndpoint, async ({ params, body: { revision, ...patch } }, request) => {
    await changeSite({ db, ...parts }, { ...params, revision, patch, act: 'site moved', ...act(request) });
    return await presented(params);
  });
  mount(router, deps, removeEndpoint, async ({ params, body }, request) => {
    await mustExist(params);
    return { removed: await removeSites(db, { ...params, ...body, ...act(request) }) };
  });
  mount(router, deps, setDutyEndpoint, async ({ params, body }, request) => {
    await setSiteDuty(db, { ...params, ...body, ...act(request) });
    return { duties: [...(await listSiteDuties(db, params))] };
  });
  mount(router, deps, getGround, async ({ params, query }) => {
    await mustExist(params);
    const ground = groundAt(relief, query);
    const elevationM = query.elevationM ?? ground.reliefM;
    const site = { ...query, elevationM, heightFromRelief: query.elevationM === undefined };
    return { ...ground, candidates: rankCandidates(site, await listStationsOfTeam(db, params.teamId)) };
  });

  const importOf = async (key: ProgrammeKey & { importId: string }) =>
    presentImport(found((await listSiteImportViews(db, key))[0] ?? null));
  mount(router, deps, startImportEndpoint, async ({ params, body }, request) => {
    await mustExist(params);
    return { id: await startSiteImport(db, { ...params, ...body, ...act(request) }) };
  });
  mount(router, deps, addRowsEndpoint, async ({ params, body }) => ({
    rows: await addSiteImportRows(db, { ...params, ...body }),
  }));
  mount(router, deps, checkImportEndpoint, async ({ params }) =>
    presentImportCheck(await checkSiteImport({ db, ...parts }, params)),
  );
  mount(router, deps, finishImportEndpoint, async ({ params, body }, request) => {
    await finishSiteImport({ db, ...parts }, { ...params, ...body, ...act(request) });
    return await importOf(params);
  });
  mount(router, deps, listSiteImports, async ({ params }) => {
    await mustExist(params);
    return { items: (await listSiteImportViews(db, params)).map(presentImport) };
  });
  mount(router, deps, undoImportEndpoint, async ({ params }, request) => {
    await undoSiteImport(db, { ...params, ...act(request) });
    return await importOf(params);
  });
  mount(router, deps, exportEndpoint, async ({ params, query }, request) => {
    await mustExist(params);
    return await exportSites(db, { ...params, ...query, taker: takerOf(request) });
  });

  async function recordOf(key: SiteKey) {
    const [row, stations, duties, changes, askedGates] = await Promise.all([
      findSiteRecord(db, key),
      listStationsOfTeam(db, key.teamId),
      listSiteDuties(db, key),
      listSiteChanges(db, { ...key, after: 0 }),
      listAskedGates(db, key),
    ]);
    const site = found(row);
    const { water, notes, madeBy, madeAt, reliefM, kmFromLand, stationId } = site;
    const toRank = { ...site, heightFromRelief: site.elevationSource === 'relief' };
    return {
      site: presentSite(makeSiteResolver(stations)(site)),
      ...{ water: presentWater(water), notes, duties: [...duties], reliefM, kmFromLand, madeBy },
      candidates: rankCandidates(toRank, stations, stationId),
      askedGates: [...askedGates],
      madeAt: madeAt.toISOString(),
      changes: changes.map(presentSiteChange),
    };
  }
}

function found<T>(thing: T | null): T {
  if (thing === null) throw new AppError('not_found', 'There is no such site in this programme, or it was removed.');
  return thing;
}

/** Every rule that changes a site lets only people through. */
function personOf({ actor }: RequestContext): string {
  if (actor.kind !== 'person') throw new AppError('not_signed_in', 'Sign in first.');
  return actor.personId;
}
