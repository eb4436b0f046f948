import type { Map as MapLibreMap } from 'maplibre-gl';
import { useEffect, useRef } from 'react';
import type { SheetPlace } from './sheet-place.ts';

/** A place chosen elsewhere (in the ranking, by its address) is brought into the frame; one that is in it moves nothing. */
export function useChosenInView(map: MapLibreMap | null, chosen: SheetPlace | undefined): void {
  const shownId = useRef<string | null>(null);
  useEffect(() => {
    if (map === null || chosen === undefined || shownId.current === chosen.id) return;
    shownId.current = chosen.id;
    const position: [number, number] = [chosen.longitude, chosen.latitude];
    if (!map.getBounds().contains(position)) map.easeTo({ center: position });
  }, [map, chosen]);
}
