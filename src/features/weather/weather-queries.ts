import { getWeatherFile, listWeatherFiles } from '../../contract/weather.ts';
import { apiQuery } from '../../lib/api-query.ts';

export const PAGE_SIZE = 50;

/** A page of the library, newest first, counted from 1. */
export function libraryQuery(teamId: string, page = 1) {
  return apiQuery(listWeatherFiles, { params: { teamId }, query: { limit: PAGE_SIZE, page } });
}

export function recordQuery(teamId: string, fileId: string) {
  return apiQuery(getWeatherFile, { params: { teamId, fileId }, query: {} });
}
