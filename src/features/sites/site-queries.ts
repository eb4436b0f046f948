import { useQueryClient } from '@tanstack/react-query';
import type { Endpoint, InputOf } from '../../contract/endpoint.ts';
import { getGround, getSite, setSiteDuty } from '../../contract/site-record.ts';
import { changeSite, listSites, makeSite, moveSite, removeSites } from '../../contract/sites.ts';
import { call } from '../../lib/api-client.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';

export interface ProgrammeKey {
  readonly teamId: string;
  readonly programmeId: string;
}
export interface SiteKey extends ProgrammeKey {
  readonly siteId: string;
}

/** A page of the programme's sites; what is left out of the query takes its default. */
export function sitesQuery({ teamId, programmeId }: ProgrammeKey, query: InputOf<typeof listSites>['query'] = {}) {
  return apiQuery(listSites, { params: { teamId, programmeId }, query });
}

export function siteQuery({ teamId, programmeId, siteId }: SiteKey) {
  return apiQuery(getSite, { params: { teamId, programmeId, siteId }, query: {} });
}

/** Height, distance from land and ranked stations at a position. */
export function groundQuery({ teamId, programmeId }: ProgrammeKey, query: InputOf<typeof getGround>['query']) {
  return apiQuery(getGround, { params: { teamId, programmeId }, query });
}

type Body<E extends Endpoint> = InputOf<E> extends { body: infer B } ? B : never;

/**
 * Makes, changes, moves and removes sites; afterwards every answer that tells of sites is asked anew. A change sends the revision that
 * was looked at; when somebody else was quicker the call throws ApiError with the code `conflict`, whose problems say what was changed.
 */
export function useSiteActs({ teamId, programmeId }: ProgrammeKey) {
  const client = useQueryClient();
  const params = { teamId, programmeId };
  const stale = async <T>(act: Promise<T>): Promise<T> => {
    try {
      return await act;
    } finally {
      for (const endpoint of [listSites, getSite]) client.invalidateQueries({ queryKey: apiKey(endpoint) });
    }
  };
  return {
    make: (body: Body<typeof makeSite>) => stale(call(makeSite, { params, query: {}, body })),
    change: (siteId: string, body: Body<typeof changeSite>) =>
      stale(call(changeSite, { params: { ...params, siteId }, query: {}, body })),
    move: (siteId: string, body: Body<typeof moveSite>) =>
      stale(call(moveSite, { params: { ...params, siteId }, query: {}, body })),
    remove: (body: Body<typeof removeSites>) => stale(call(removeSites, { params, query: {}, body })),
    setDuty: (siteId: string, duty: InputOf<typeof setSiteDuty>['params']['duty'], body: Body<typeof setSiteDuty>) =>
      stale(call(setSiteDuty, { params: { ...params, siteId, duty }, query: {}, body })),
  };
}
