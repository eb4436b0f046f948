import { queryOptions } from '@tanstack/react-query';
import { type DerivedPreview, previewDerivedYear } from '../../contract/climate.ts';
import { getWeatherFile, listWeatherFiles } from '../../contract/weather.ts';
import type { MonthlyChange } from '../../contract/weather-change.ts';
import type { HumidityRule } from '../../engine/climate/monthly-change.ts';
import { call } from '../../lib/api-client.ts';
import { apiQuery } from '../../lib/api-query.ts';

export const PAGE_SIZE = 50;

/** A page of the library, newest first, counted from 1. */
export function libraryQuery(teamId: string, page = 1) {
  return apiQuery(listWeatherFiles, { params: { teamId }, query: { limit: PAGE_SIZE, page } });
}

export function recordQuery(teamId: string, fileId: string) {
  return apiQuery(getWeatherFile, { params: { teamId, fileId }, query: {} });
}

/** A change of climate as it is sent. */
export interface ClimateChange {
  readonly humidityRule: HumidityRule;
  readonly monthly: MonthlyChange[];
}

/** What a change would make of a year; the same change of an accepted year is always the same answer. */
export function previewQuery(params: { teamId: string; fileId: string }, change: ClimateChange | null) {
  return queryOptions<DerivedPreview>({
    queryKey: [previewDerivedYear.path, params, change],
    queryFn: ({ signal }) => {
      if (change === null) throw new TypeError('there is no change to preview');
      return call(previewDerivedYear, { params, query: {}, body: change }, { signal });
    },
    staleTime: Number.POSITIVE_INFINITY,
  });
}
