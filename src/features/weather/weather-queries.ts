import { getWeatherFile, listWeatherFiles } from '../../contract/weather.ts';
import { apiQuery } from '../../lib/api-query.ts';

export const PAGE_SIZE = 50;

/** A page of the library, newest first. */
export function libraryQuery(teamId: string, after?: string) {
  const query = after === undefined ? { limit: PAGE_SIZE } : { limit: PAGE_SIZE, after };
  return apiQuery(listWeatherFiles, { params: { teamId }, query });
}

export function recordQuery(teamId: string, fileId: string) {
  return apiQuery(getWeatherFile, { params: { teamId, fileId }, query: {} });
}
