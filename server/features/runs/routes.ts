import type { Router } from 'express';
import { getDepressionMap } from '#contract/depression-map.ts';
import { getDesignPoints } from '#contract/design-points.ts';
import { listRunHours as listHoursEndpoint } from '#contract/hour-list.ts';
import { getSitePlace, getStationPlace } from '#contract/place.ts';
import { findWhatWouldPass, judgeRange } from '#contract/place-doubts.ts';
import { getMap } from '#contract/programme-map.ts';
import { rankPlaces as rankEndpoint } from '#contract/ranking.ts';
import { rescore as rescoreEndpoint } from '#contract/rescore.ts';
import { exportRunHours as exportEndpoint, getRunHours } from '#contract/run-hours.ts';
import { getRun } from '#contract/runs.ts';
import { getEstimate, getSurface, judgeSurface } from '#contract/surface.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { closedTo } from '../../http/closed-to.ts';
import { makeKeptAnswers } from '../../http/kept-answers.ts';
import { type Handler, mount } from '../../http/mount.ts';
import { takerOf } from '../../http/taker-of.ts';
import { briefOfProgramme, presentBriefBasis } from './brief-basis.ts';
import { makeColumnCache } from './column-cache.ts';
import { depressionMap } from './depression-map.ts';
import { estimatePlace } from './estimate-place.ts';
import { exportRunHours } from './export-run-hours.ts';
import { findDesignPoints } from './find-design-points.ts';
import { judgeSitePlace } from './judge-site-place.ts';
import { byStation, judgeStation } from './judge-station.ts';
import { makeLinesOfYears } from './lines-of-years.ts';
import { listRunHours } from './list-run-hours.ts';
import { judgePlaceRange, whatWouldPass } from './place-doubts.ts';
import { placeToJudge } from './place-to-judge.ts';
import { presentMapSite, presentMapStation } from './present-map.ts';
import { presentPlace } from './present-place.ts';
import { presentRun } from './present-run.ts';
import { makePreviewTurns } from './preview-turns.ts';
import { programmePlaces } from './programme-places.ts';
import { rankProgramme } from './rank-programme.ts';
import { rescore, scoredUnder } from './rescore.ts';
import { readRunHours } from './run-hours-read-model.ts';
import { findRunRecord } from './run-record-read-model.ts';
import type { RunsParts } from './runs-parts.ts';
import { scoredStations } from './scored-stations.ts';
import { makeSharedJudging } from './shared-judging.ts';
import { listStationYears } from './station-years-read-model.ts';
import { surfaceOf } from './surface.ts';
import { makeSurfaceGrounds } from './surface-ground.ts';

/** Packed columns kept for re-scoring: some 8,700 weather years, whatever the number of teams. */
const CACHED_BYTES = 512 * 1024 * 1024;
/** Previews at once, over all people: each may keep every thread for a while. */
const MOST_PREVIEWS = 16;

export function runsRoutes(
  router: Router,
  deps: Deps,
  { threads, relief, yearThread, readDraft, originalToRead }: RunsParts,
): void {
  const { db } = deps;
  const cache = makeColumnCache(db, { maxBytes: CACHED_BYTES });
  const lines = makeLinesOfYears({ yearThread, originalToRead });
  const grounds = makeSurfaceGrounds(threads);
  const shared = makeSharedJudging();
  const inTurn = makePreviewTurns(MOST_PREVIEWS);

  const map: Handler<typeof getMap> = async ({ params: { teamId, programmeId }, query }) => {
    const brief = await briefOfProgramme(db, { teamId, programmeId, briefId: query.brief });
    const { stations, sites, pending } = await programmePlaces(db, { teamId, programmeId, brief });
    return {
      programme: { id: programmeId, name: brief.programmeName },
      invented: brief.invented,
      brief: presentBriefBasis(brief),
      stations: stations.map(presentMapStation),
      sites: sites.map(presentMapSite),
      pending,
    };
  };
  mount(router, deps, getMap, map, makeKeptAnswers());

  mount(router, deps, getSurface, async ({ params: { teamId, programmeId }, query }, { signal }) => {
    const brief = await briefOfProgramme(db, { teamId, programmeId, briefId: query.brief });
    const stations = await scoredStations(db, { teamId, brief });
    return surfaceOf(grounds, { stations, anchors: brief.body.score, held: query.held, signal });
  });

  mount(router, deps, judgeSurface, async ({ params: { teamId, programmeId }, body: { body, held } }, { signal }) => {
    const brief = readDraft(body);
    await briefOfProgramme(db, { teamId, programmeId });
    return inTurn(async () => {
      const stations = await scoredUnder({ db, threads, cache, shared }, { teamId, programmeId, brief, signal });
      return surfaceOf(grounds, { stations, anchors: brief.score, held, signal });
    });
  });

  mount(router, deps, getEstimate, async ({ params: { teamId, programmeId }, query }) => {
    const { brief: briefId, ...position } = query;
    const brief = await briefOfProgramme(db, { teamId, programmeId, briefId });
    const stations = await scoredStations(db, { teamId, brief });
    return estimatePlace(relief, { brief, stations, position });
  });

  mount(router, deps, getDepressionMap, async ({ params: { teamId }, query }) => {
    return depressionMap(db, { teamId, ...query });
  });

  mount(router, deps, getStationPlace, async ({ params: { teamId, programmeId, stationId }, query }) => {
    const brief = await briefOfProgramme(db, { teamId, programmeId, briefId: query.brief });
    const { briefVersionId } = brief;
    const years = await listStationYears(db, { teamId, briefVersionId, methodVersion: METHOD_VERSION, stationId });
    const [group] = byStation(years);
    if (group === undefined) throw new AppError('not_found', 'There is no such station on the map of this team.');
    const { invented } = brief;
    return presentPlace(judgeStation(brief.body, group), { brief: presentBriefBasis(brief), invented, site: null });
  });

  mount(router, deps, getSitePlace, async ({ params, query }) => {
    const brief = await briefOfProgramme(db, { ...params, briefId: query.brief });
    const { judged, ...site } = await judgeSitePlace(db, { ...params, brief });
    return presentPlace(judged, { brief: presentBriefBasis(brief), invented: brief.invented, site });
  });

  mount(router, deps, rescoreEndpoint, async ({ params: { teamId, programmeId }, query, body }, { signal }) => {
    const brief = readDraft(body.body);
    await briefOfProgramme(db, { teamId, programmeId });
    const { stationIds = null, siteIds = [] } = body;
    const asked = { teamId, programmeId, brief, stationIds, siteIds, withHashes: query.hashes === 'yes', signal };
    return inTurn(() => rescore({ db, threads, cache, shared }, asked));
  });

  const briefAsked = async (
    key: { teamId: string; programmeId: string },
    of: { brief?: string | undefined; draft?: unknown },
  ) => {
    const saved = await briefOfProgramme(db, { ...key, briefId: of.brief });
    return of.draft === undefined ? saved.body : readDraft(of.draft);
  };

  mount(router, deps, judgeRange, async ({ params, query, body }, { signal }) => {
    const brief = await briefAsked(params, { ...query, draft: body.body });
    const place = await placeToJudge({ db, cache }, { ...params, signal });
    return inTurn(() => judgePlaceRange({ threads, brief, place, signal }));
  });

  mount(router, deps, findWhatWouldPass, async ({ params, query, body }, { signal }) => {
    const brief = await briefAsked(params, { ...query, draft: body.body });
    const place = await placeToJudge({ db, cache }, { ...params, signal });
    return inTurn(() => whatWouldPass({ threads, brief, place, signal }));
  });

  mount(router, deps, rankEndpoint, async ({ params, query, body }, { signal }) => {
    const brief = await briefOfProgramme(db, { ...params, briefId: query.brief });
    const { placeIds = null, ...asked } = body;
    return inTurn(() => rankProgramme({ db, cache, threads }, { ...params, ...asked, placeIds, brief, signal }));
  });

  mount(router, deps, exportEndpoint, async ({ params }, request) => {
    const { actor, signal } = request;
    const role = actor.kind === 'person' ? (actor.roles.get(params.teamId.toLowerCase()) ?? null) : null;
    const asked = { ...params, role, closed: closedTo(actor), taker: takerOf(request), signal };
    return await exportRunHours({ db, yearThread }, asked);
  });

  mount(router, deps, listHoursEndpoint, async ({ params, query }, { actor, signal }) =>
    listRunHours({ db, yearThread, lines }, { ...params, ...query, closed: closedTo(actor), signal }),
  );

  mount(router, deps, getDesignPoints, async ({ params }, { actor }) =>
    findDesignPoints(db, { ...params, closed: closedTo(actor) }),
  );

  mount(router, deps, getRun, async ({ params }, { actor }) => {
    const run = await findRunRecord(db, { ...params, closed: closedTo(actor) });
    if (run === null) throw new AppError('not_found', 'There is no such run in this team.');
    return presentRun(run);
  });

  mount(router, deps, getRunHours, async ({ params }, { actor }) => {
    const body = await readRunHours(db, { ...params, closed: closedTo(actor) });
    if (body === null) throw new AppError('not_found', 'There is no such run in this team.');
    return { body };
  });
}
