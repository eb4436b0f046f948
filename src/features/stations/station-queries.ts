import { useQueryClient } from '@tanstack/react-query';
import { getStationPlace } from '../../contract/place.ts';
import { getMap } from '../../contract/programme-map.ts';
import { getStation, listStations } from '../../contract/stations.ts';
import { getWeatherFile } from '../../contract/weather.ts';
import { listWeatherFiles } from '../../contract/weather-library.ts';
import { apiKey, apiQuery } from '../../lib/api-query.ts';

const PAGE_SIZE = 50;
/** Stations to choose from when two are merged. */
const MOST_CHOICES = 500;

export function stationsQuery(teamId: string, asked: { text: string; page: number }) {
  const { text, page } = asked;
  return apiQuery(listStations, {
    params: { teamId },
    query: { page, limit: PAGE_SIZE, ...(text === '' ? {} : { text }) },
  });
}

export function stationQuery(teamId: string, stationId: string) {
  return apiQuery(getStation, { params: { teamId, stationId }, query: {} });
}

/** Stations whose name or WMO number holds a text, to choose one from. */
export function stationChoicesQuery(teamId: string, text: string) {
  return apiQuery(listStations, {
    params: { teamId },
    query: { page: 1, limit: MOST_CHOICES, ...(text === '' ? {} : { text }) },
  });
}

/** Marks every answer that a changed station makes stale. */
export function useStationChanged(): () => void {
  const client = useQueryClient();
  return () => {
    for (const endpoint of [listStations, getStation, listWeatherFiles, getWeatherFile, getMap, getStationPlace]) {
      client.invalidateQueries({ queryKey: apiKey(endpoint) });
    }
  };
}
