import type { Router } from 'express';
import { getMap } from '#contract/programme-map.ts';
import { rescore as rescoreEndpoint } from '#contract/rescore.ts';
import { exportRunHours as exportEndpoint, getRunHours } from '#contract/run-hours.ts';
import { getStationPlace } from '#contract/runs.ts';
import type { Brief } from '#engine/brief/brief.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import type { Actor } from '../../http/request-context.ts';
import { briefOfProgramme, presentBriefBasis } from './brief-basis.ts';
import { makeColumnCache } from './column-cache.ts';
import { type ExportParts, exportRunHours } from './export-run-hours.ts';
import { byStation, judgeStation } from './judge-station.ts';
import { presentMapStation } from './present-map.ts';
import { presentPlace } from './present-place.ts';
import { makePreviewTurns } from './preview-turns.ts';
import { type RescoreThreads, rescore } from './rescore.ts';
import { readRunHours } from './run-hours-read-model.ts';
import { listStationYears } from './station-years-read-model.ts';

/** Packed columns kept for re-scoring: some 8,700 weather years, whatever the number of teams. */
const CACHED_BYTES = 512 * 1024 * 1024;
/** Previews at once, over all people: each may keep every thread for a while. */
const MOST_PREVIEWS = 16;

/** What runs need of the other parts, handed in where the server is wired. */
export interface RunsParts {
  readonly threads: RescoreThreads;
  readonly yearThread: ExportParts['yearThread'];
  /** The brief in a request's body, or every fault of it at its path. */
  readonly readDraft: (draft: unknown) => Brief;
}

export function runsRoutes(router: Router, deps: Deps, { threads, yearThread, readDraft }: RunsParts): void {
  const { db } = deps;
  const cache = makeColumnCache(db, { maxBytes: CACHED_BYTES });
  const inTurn = makePreviewTurns(MOST_PREVIEWS);

  mount(router, deps, getMap, async ({ params: { teamId, programmeId }, query }) => {
    const brief = await briefOfProgramme(db, { teamId, programmeId, briefId: query.brief });
    const { briefVersionId } = brief;
    const years = await listStationYears(db, { teamId, briefVersionId, methodVersion: METHOD_VERSION });
    const stations = byStation(years).map((group) => judgeStation(brief.body, group));
    return {
      programme: { id: programmeId, name: brief.programmeName },
      invented: brief.invented,
      brief: presentBriefBasis(brief),
      stations: stations.map(presentMapStation),
      pending: stations.reduce((sum, { pending }) => sum + pending, 0),
    };
  });

  mount(router, deps, getStationPlace, async ({ params: { teamId, programmeId, stationId }, query }) => {
    const brief = await briefOfProgramme(db, { teamId, programmeId, briefId: query.brief });
    const { briefVersionId } = brief;
    const years = await listStationYears(db, { teamId, briefVersionId, methodVersion: METHOD_VERSION, stationId });
    const [group] = byStation(years);
    if (group === undefined) throw new AppError('not_found', 'There is no such station on the map of this team.');
    return presentPlace(judgeStation(brief.body, group), { brief: presentBriefBasis(brief), invented: brief.invented });
  });

  mount(router, deps, rescoreEndpoint, async ({ params: { teamId, programmeId }, query, body }, { signal }) => {
    const brief = readDraft(body.body);
    await briefOfProgramme(db, { teamId, programmeId });
    const asked = { teamId, brief, stationIds: body.stationIds ?? null, withHashes: query.hashes === 'yes', signal };
    return inTurn(() => rescore({ db, threads, cache }, asked));
  });

  mount(router, deps, exportEndpoint, async ({ params }, { actor, signal }) => {
    const role = actor.kind === 'person' ? (actor.roles.get(params.teamId.toLowerCase()) ?? null) : null;
    return await exportRunHours({ db, yearThread }, { ...params, role, closed: closedTo(actor), signal });
  });

  mount(router, deps, getRunHours, async ({ params }, { actor }) => {
    const body = await readRunHours(db, { ...params, closed: closedTo(actor) });
    if (body === null) throw new AppError('not_found', 'There is no such run in this team.');
    return { body };
  });
}

/** A run is named without its programme, so the rule of the path cannot see whose it is. */
function closedTo(actor: Actor): readonly string[] {
  return actor.kind === 'person' ? [...actor.closedProgrammes] : [];
}
