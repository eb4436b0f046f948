import { queryOptions, useQueryClient } from '@tanstack/react-query';
import { type DerivedPreview, previewDerivedYear } from '../../contract/climate.ts';
import { listStations } from '../../contract/stations.ts';
import { getWeatherFile } from '../../contract/weather.ts';
import { listWeatherBatches } from '../../contract/weather-batches.ts';
import type { MonthlyChange } from '../../contract/weather-change.ts';
import { listWeatherFiles } from '../../contract/weather-library.ts';
import { getWeatherFileLines, MOST_LINES } from '../../contract/weather-reading.ts';
import type { HumidityRule } from '../../engine/climate/monthly-change.ts';
import { call } from '../../lib/api-client.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';
import { newestFirst } from './library-view.ts';

const PAGE_SIZE = 50;

/** A page of the library; without a view, the newest files. */
export function libraryQuery(teamId: string, view = newestFirst) {
  return apiQuery(listWeatherFiles, { params: { teamId }, query: { limit: PAGE_SIZE, ...view } });
}

/** What of a batch is being read at the moment, the first few. */
export function readingNowQuery(teamId: string, batchId: string) {
  const query = { batchId, status: 'reading', sort: 'name', order: 'asc', limit: 6 } as const;
  return apiQuery(listWeatherFiles, { params: { teamId }, query });
}

/** Accepted files of a station, one of which may take the place of another. */
export function acceptedAtQuery(teamId: string, stationId: string) {
  const query = { stationId, status: 'accepted', limit: 200 } as const;
  return apiQuery(listWeatherFiles, { params: { teamId }, query });
}

export function batchesQuery(teamId: string) {
  return apiQuery(listWeatherBatches, { params: { teamId }, query: { limit: 20 } });
}

/** Stations to choose from, by name. */
export function stationChoiceQuery(teamId: string) {
  return apiQuery(listStations, { params: { teamId }, query: { limit: 500 } });
}

/** The first lines of an original, as far as they are given at once. */
export function firstLinesQuery(teamId: string, fileId: string) {
  return apiQuery(getWeatherFileLines, { params: { teamId, fileId }, query: { from: 1, count: MOST_LINES } });
}

/** Marks every answer that a changed file makes stale. */
export function useWeatherChanged(): () => void {
  const client = useQueryClient();
  return () => {
    for (const endpoint of [listWeatherFiles, getWeatherFile, listWeatherBatches])
      client.invalidateQueries({ queryKey: apiKey(endpoint) });
  };
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
