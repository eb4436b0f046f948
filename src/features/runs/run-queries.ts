import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { getDepressionMap } from '../../contract/depression-map.ts';
import { type DesignPoints, getDesignPoints } from '../../contract/design-points.ts';
import type { AnswerOf } from '../../contract/endpoint.ts';
import { type HourList, listRunHours } from '../../contract/hour-list.ts';
import { getSitePlace, getStationPlace, type Place } from '../../contract/place.ts';
import { findWhatWouldPass, judgeRange, type PlaceRange, type WhatWouldPass } from '../../contract/place-doubts.ts';
import { getMap } from '../../contract/programme-map.ts';
import { type Ranking, type RankingView, rankPlaces } from '../../contract/ranking.ts';
import { getRunHours } from '../../contract/run-hours.ts';
import { getRun, type RunRecord } from '../../contract/runs.ts';
import { call, callForBytes } from '../../lib/api-client.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';
import type { PlaceRef } from '../../map/sheet-place.ts';
import type { HourChoice } from './hour-choice.ts';
import { ALL_MONTHS } from './map-layer.ts';

/** Dozens of judgings: asked again only after a while, or under another draft. */
const JUDGED_MS = 5 * 60_000;

export interface ProgrammeIds {
  readonly teamId: string;
  readonly programmeId: string;
  /** Of several briefs the one in view; null: the one that was saved last. */
  readonly briefId: string | null;
}

export function mapQuery({ teamId, programmeId, briefId }: ProgrammeIds) {
  return apiQuery(getMap, { params: { teamId, programmeId }, query: ofBrief(briefId) });
}

/** A station or a site as a place. The one before stays until the next is there. */
export function placeQuery({ teamId, programmeId, briefId }: ProgrammeIds, { kind, id }: PlaceRef) {
  const query = ofBrief(briefId);
  const station = { params: { teamId, programmeId, stationId: id }, query };
  const site = { params: { teamId, programmeId, siteId: id }, query };
  return queryOptions<Place>({
    queryKey: kind === 'station' ? apiKey(getStationPlace, station) : apiKey(getSitePlace, site),
    queryFn: ({ signal }) =>
      kind === 'station' ? call(getStationPlace, station, { signal }) : call(getSitePlace, site, { signal }),
    placeholderData: keepPreviousData,
  });
}

function ofBrief(briefId: string | null): { brief?: string } {
  return briefId === null ? {} : { brief: briefId };
}

/** Depression hours of every station, in whole kelvin and months. */
export function depressionQuery(teamId: string, asked: { atLeastK: number; months: readonly number[] }) {
  const { atLeastK, months } = asked;
  const query = months.length === ALL_MONTHS.length ? { atLeastK } : { atLeastK, months: months.join(',') };
  const input = { params: { teamId }, query };
  return queryOptions<AnswerOf<typeof getDepressionMap>>({
    queryKey: apiKey(getDepressionMap, input),
    queryFn: ({ signal }) => call(getDepressionMap, input, { signal }),
    placeholderData: keepPreviousData,
  });
}

/** The hour classes of a run; a run never changes, so they are fetched once. */
export function runHoursQuery(teamId: string, runId: string) {
  const input = { params: { teamId, runId }, query: {} };
  return queryOptions<Uint8Array>({
    queryKey: apiKey(getRunHours, input),
    queryFn: ({ signal }) => callForBytes(getRunHours, input, { signal }),
    staleTime: Number.POSITIVE_INFINITY,
  });
}

/** One run by itself; it never changes. */
export function runQuery(teamId: string, runId: string) {
  const input = { params: { teamId, runId }, query: {} };
  return queryOptions<RunRecord>({
    queryKey: apiKey(getRun, input),
    queryFn: ({ signal }) => call(getRun, input, { signal }),
    staleTime: Number.POSITIVE_INFINITY,
  });
}

/** The places that are named in their order, and how sure it is; judged anew, so asked again only after a while. */
export function rankingQuery(
  { teamId, programmeId, briefId }: ProgrammeIds,
  body: { view: RankingView; placeIds: string[] },
) {
  const input = { params: { teamId, programmeId }, query: ofBrief(briefId), body };
  return queryOptions<Ranking>({
    queryKey: [rankPlaces.path, teamId, programmeId, briefId, body.view, ...body.placeIds],
    queryFn: ({ signal }) => call(rankPlaces, input, { signal }),
    staleTime: JUDGED_MS,
  });
}

/** What the plant of a run does at the design values of its year. */
export function designPointsQuery(run: { teamId: string; runId: string }) {
  const input = { params: run, query: {} };
  return queryOptions<DesignPoints>({
    queryKey: apiKey(getDesignPoints, input),
    queryFn: ({ signal }) => call(getDesignPoints, input, { signal }),
    staleTime: Number.POSITIVE_INFINITY,
  });
}

/** Hours of a run one by one, with their weather, reason and line; they never change either. */
export function hourListQuery(run: { teamId: string; runId: string }, { choice, page, limit }: HourPage) {
  const input = { params: run, query: { ...choice, page, limit } };
  return queryOptions<HourList>({
    queryKey: apiKey(listRunHours, input),
    queryFn: ({ signal }) => call(listRunHours, input, { signal }),
    staleTime: Number.POSITIVE_INFINITY,
  });
}

export interface HourPage {
  readonly choice: HourChoice;
  readonly page: number;
  readonly limit: number;
}

/** What is asked of one place under the saved brief, or under a draft of it. */
export interface PlaceAsked {
  readonly place: PlaceRef;
  readonly draft: { readonly key: string; readonly body: Readonly<Record<string, unknown>> } | null;
  /** The version that is in view; another one is asked anew. */
  readonly briefVersionId: string;
}

/** How far the score of a place moves with what is not known for certain. */
export function rangeQuery(ids: ProgrammeIds, asked: PlaceAsked) {
  const input = inputOf(ids, asked);
  return queryOptions<PlaceRange>({
    queryKey: [judgeRange.path, ...keyOf(ids, asked)],
    queryFn: ({ signal }) => call(judgeRange, input, { signal }),
    staleTime: JUDGED_MS,
  });
}

/** The least single changes that turn the verdict of a place. */
export function whatWouldPassQuery(ids: ProgrammeIds, asked: PlaceAsked) {
  const input = inputOf(ids, asked);
  return queryOptions<WhatWouldPass>({
    queryKey: [findWhatWouldPass.path, ...keyOf(ids, asked)],
    queryFn: ({ signal }) => call(findWhatWouldPass, input, { signal }),
    staleTime: JUDGED_MS,
  });
}

function inputOf({ teamId, programmeId, briefId }: ProgrammeIds, { place, draft }: PlaceAsked) {
  const placeKind: 'sites' | 'stations' = place.kind === 'site' ? 'sites' : 'stations';
  const params = { teamId, programmeId, placeKind, placeId: place.id };
  return { params, query: ofBrief(briefId), body: draft === null ? {} : { body: { ...draft.body } } };
}

function keyOf({ teamId, programmeId }: ProgrammeIds, { place, draft, briefVersionId }: PlaceAsked) {
  return [teamId, programmeId, place.kind, place.id, briefVersionId, draft?.key ?? null];
}
