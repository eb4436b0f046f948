import { queryOptions } from '@tanstack/react-query';
import { getMap, getRunHours, getStationPlace } from '../../contract/runs.ts';
import { callForBytes } from '../../lib/api-client.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';

export interface ProgrammeIds {
  readonly teamId: string;
  readonly programmeId: string;
}

export function mapQuery(ids: ProgrammeIds) {
  return apiQuery(getMap, { params: { ...ids }, query: {} });
}

export function placeQuery(ids: ProgrammeIds, stationId: string) {
  return apiQuery(getStationPlace, { params: { ...ids, stationId }, query: {} });
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
