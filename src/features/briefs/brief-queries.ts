import { queryOptions } from '@tanstack/react-query';
import type { BriefDraft } from '../../contract/brief-body.ts';
import {
  type BriefPreview,
  compareBriefVersions,
  getBriefVersion,
  listBriefs,
  listBriefVersions,
  listPresets,
  previewBrief,
} from '../../contract/briefs.ts';
import { call } from '../../lib/api-client.ts';
import { apiQuery } from '../../lib/api-query.ts';

export interface ProgrammeKey {
  readonly teamId: string;
  readonly programmeId: string;
}

export interface BriefKey extends ProgrammeKey {
  readonly briefId: string;
}

export function presetsQuery(teamId: string) {
  return apiQuery(listPresets, { params: { teamId }, query: {} });
}

export function briefsQuery({ teamId, programmeId }: ProgrammeKey) {
  return apiQuery(listBriefs, { params: { teamId, programmeId }, query: {} });
}

export function versionsQuery({ teamId, programmeId, briefId }: BriefKey) {
  return apiQuery(listBriefVersions, { params: { teamId, programmeId, briefId }, query: {} });
}

export function versionQuery({ teamId, programmeId, briefId }: BriefKey, version: number) {
  return apiQuery(getBriefVersion, { params: { teamId, programmeId, briefId, version }, query: {} });
}

export function differenceQuery({ teamId, programmeId, briefId }: BriefKey, between: { from: number; to: number }) {
  return apiQuery(compareBriefVersions, { params: { teamId, programmeId, briefId }, query: { ...between } });
}

const PREVIEW_KEPT_MS = 60_000;

/** Keyed by the draft itself, so that an answer to an older draft is never shown for a newer one. */
export function previewQuery({ teamId, programmeId }: ProgrammeKey, asked: { stationId: string; body: BriefDraft }) {
  return queryOptions<BriefPreview>({
    queryKey: [previewBrief.path, teamId, programmeId, asked.stationId, asked.body],
    queryFn: ({ signal }) =>
      call(previewBrief, { params: { teamId, programmeId }, query: {}, body: { ...asked } }, { signal }),
    staleTime: PREVIEW_KEPT_MS,
    gcTime: PREVIEW_KEPT_MS,
  });
}
