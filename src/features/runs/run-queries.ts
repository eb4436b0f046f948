import { queryOptions } from '@tanstack/react-query';
import { getMap } from '../../contract/programme-map.ts';
import { getRunHours } from '../../contract/run-hours.ts';
import { getStationPlace } from '../../contract/runs.ts';
import { callForBytes } from '../../lib/api-client.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';

export interface ProgrammeIds {
  readonly teamId: string;
  readonly programmeId: string;
  /** Of several briefs the one in view; null: the one that was saved last. */
  readonly briefId: string | null;
}

export function mapQuery({ teamId, programmeId, briefId }: ProgrammeIds) {
  return apiQuery(getMap, { params: { teamId, programmeId }, query: ofBrief(briefId) });
}

export function placeQuery({ teamId, programmeId, briefId }: ProgrammeIds, stationId: string) {
  return apiQuery(getStationPlace, { params: { teamId, programmeId, stationId }, query: ofBrief(briefId) });
}

function ofBrief(briefId: string | null): { brief?: string } {
  return briefId === null ? {} : { brief: briefId };
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
