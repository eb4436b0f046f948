import type { Router } from 'express';
import {
  compareBriefVersions,
  getBriefVersion,
  listBriefs,
  listBriefVersions,
  listPresets,
  makeBrief as makeEndpoint,
  previewBrief as previewEndpoint,
  saveBriefVersion as saveEndpoint,
} from '#contract/briefs.ts';
import { briefDifference } from '#engine/brief/brief-difference.ts';
import { METHOD_VERSION } from '#engine/conventions.ts';
import type { Deps } from '../../deps.ts';
import { AppError } from '../../http/app-error.ts';
import { mount } from '../../http/mount.ts';
import type { RequestContext } from '../../http/request-context.ts';
import { type BriefAct, type BriefParts, makeBrief } from './make-brief.ts';
import { presentPreset, presentVersion, presentVersionRecord } from './present-brief.ts';
import { presetBrief, presetNames } from './presets.ts';
import { type PreviewParts, previewBrief } from './preview-brief.ts';
import { saveBriefVersion } from './save-brief-version.ts';
import {
  findVersion,
  listNewestVersions,
  listStationsOfVersion,
  listVersions,
  programmeExists,
} from './version-read-model.ts';

const methodVersion = METHOD_VERSION;

type VersionKey = { teamId: string; programmeId: string; briefId: string; version: number };

export function briefsRoutes(router: Router, deps: Deps, parts: BriefParts & Pick<PreviewParts, 'threads'>): void {
  const { db } = deps;
  const versionOf = async (key: VersionKey) => found(await findVersion(db, { ...key, methodVersion }));

  mount(router, deps, listPresets, async () => ({
    items: presetNames().map((id) => presentPreset(id, presetBrief(id))),
  }));

  mount(router, deps, listBriefs, async ({ params }) => {
    if (!(await programmeExists(db, params)))
      throw new AppError('not_found', 'There is no such programme in this team.');
    return { items: (await listNewestVersions(db, { ...params, methodVersion })).map(presentVersion) };
  });

  mount(router, deps, makeEndpoint, async ({ params, body }, request) => {
    const made = await makeBrief({ db, ...parts }, { ...params, ...body, ...actOf(request) });
    return presentVersion(await versionOf({ ...params, ...made }));
  });

  mount(router, deps, listBriefVersions, async ({ params }) => {
    const versions = await listVersions(db, { ...params, methodVersion });
    if (versions.length === 0) throw new AppError('not_found', 'There is no such brief in this programme.');
    return { items: versions.map(presentVersion) };
  });

  mount(router, deps, getBriefVersion, async ({ params }) => {
    const row = await versionOf(params);
    const key = { teamId: params.teamId, versionId: row.versionId, methodVersion };
    return presentVersionRecord(row, await listStationsOfVersion(db, key));
  });

  mount(router, deps, compareBriefVersions, async ({ params, query: { from, to } }) => {
    const [before, after] = [
      await versionOf({ ...params, version: from }),
      await versionOf({ ...params, version: to }),
    ];
    return { from, to, changes: briefDifference(before.body, after.body) };
  });

  mount(router, deps, saveEndpoint, async ({ params, body: { basedOn, body: draft } }, request) => {
    const saved = await saveBriefVersion({ db, ...parts }, { ...params, basedOn, draft, ...actOf(request) });
    return { version: presentVersion(await versionOf({ ...params, version: saved.version })), made: saved.made };
  });

  mount(router, deps, previewEndpoint, async ({ params, body: { stationId, body: draft } }, { signal }) =>
    previewBrief({ db, threads: parts.threads }, { ...params, stationId, draft, signal }),
  );
}

function found<T>(thing: T | null): T {
  if (thing === null) throw new AppError('not_found', 'There is no such brief, or no such version of it.');
  return thing;
}

/** Every rule of this feature lets only people through. */
function actOf({ actor, requestId }: RequestContext): BriefAct {
  if (actor.kind !== 'person') throw new AppError('not_signed_in', 'Sign in first.');
  return { personId: actor.personId, requestId };
}
