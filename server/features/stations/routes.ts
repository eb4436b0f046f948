import type { Router } from 'express';
import {
  getStation,
  listStations,
  mergeStations as mergeEndpoint,
  moveStation as moveEndpoint,
  setRuleOff as setRuleOffEndpoint,
  setRuleOn as setRuleOnEndpoint,
} from '#contract/stations.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { mergeStations } from './merge-stations.ts';
import { moveStation, type StationParts } from './move-station.ts';
import { presentRuleOff, presentStation } from './present-station.ts';
import { findStationView, listRulesOff, listStationViews } from './station-read-model.ts';
import { setRuleOff, setRuleOn } from './switch-rule.ts';

type StationKey = { readonly teamId: string; readonly stationId: string };

/** What the page of a station shows of another feature. */
export interface StationPageParts extends StationParts {
  /** Its files, newest first, as they cross the wire. */
  filesOfStation(key: StationKey): Promise<StationFiles>;
}
type StationFiles = Awaited<ReturnType<Parameters<typeof mount<typeof getStation>>[3]>>['files'];

export function stationsRoutes(router: Router, deps: Deps, parts: StationPageParts): void {
  const { db } = deps;
  const act = (request: RequestContext) => ({
    personId: personOf(request),
    requestId: request.requestId,
    at: deps.now(),
  });
  const presented = async (key: StationKey) => presentStation(found(await findStationView(db, key)));
  const rulesOff = async (key: StationKey) => (await listRulesOff(db, key)).map(presentRuleOff);

  mount(router, deps, listStations, async ({ params: { teamId }, query }) => {
    const { views, total } = await listStationViews(db, { teamId, ...query });
    const pages = Math.max(1, Math.ceil(total / query.limit));
    return { items: views.map(presentStation), total, page: query.page, pages };
  });
  mount(router, deps, getStation, async ({ params }) => ({
    station: await presented(params),
    files: await parts.filesOfStation(params),
    rulesOff: await rulesOff(params),
  }));
  mount(router, deps, moveEndpoint, async ({ params, body }, request) => {
    await moveStation({ db, ...parts }, { ...params, ...body, ...act(request) });
    return await presented(params);
  });
  mount(router, deps, mergeEndpoint, async ({ params, body }, request) => {
    await mergeStations({ db, ...parts }, { ...params, ...body, ...act(request) });
    return await presented(params);
  });
  mount(router, deps, setRuleOffEndpoint, async ({ params, body }, request) => {
    await setRuleOff(db, { ...params, reason: body.reason, ...act(request) });
    return { rulesOff: await rulesOff(params) };
  });
  mount(router, deps, setRuleOnEndpoint, async ({ params }, request) => {
    await setRuleOn(db, { ...params, ...act(request) });
    return { rulesOff: await rulesOff(params) };
  });
}

function found<T>(thing: T | null): T {
  if (thing === null) throw new AppError('not_found', 'There is no such station in this team.');
  return thing;
}

/** Every rule that changes a station lets only people through. */
function personOf({ actor }: RequestContext): string {
  if (actor.kind !== 'person') throw new AppError('not_signed_in', 'Sign in first.');
  return actor.personId;
}
