import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { DepressionHours, MapLayer } from '../../../features/runs/map-layer.ts';
import { depressionQuery } from '../../../features/runs/run-queries.ts';

const NONE: DepressionHours = new Map();

/** Hours of the depression layer by station; asked for while that layer is shown. */
export function useDepression(teamId: string, layer: MapLayer): DepressionHours {
  const isShown = layer.kind === 'depression';
  const options = depressionQuery(teamId, isShown ? layer : { atLeastK: 0, months: [] });
  const { data } = useQuery({ ...options, enabled: isShown });
  return useMemo(
    () => (data === undefined ? NONE : new Map(data.stations.map(({ stationId, hours }) => [stationId, hours]))),
    [data],
  );
}
