import type { Map as MapLibreMap } from 'maplibre-gl';
import { type RefObject, useEffect } from 'react';

/** The first frame that has the stations, in the page's own record of times: what a benchmark asks for. */
export const STATIONS_DRAWN = 'stations drawn';

/** `data-idle` stands on the sheet while everything asked for is drawn: what a test waits for. */
export function useIdleMark(
  map: MapLibreMap | null,
  { wrapper, source }: { readonly wrapper: RefObject<HTMLDivElement | null>; readonly source: string },
): void {
  // After every change of what is to be drawn: not idle until the map has said so again.
  useEffect(() => {
    wrapper.current?.removeAttribute('data-idle');
    map?.triggerRepaint();
  });
  useEffect(() => {
    if (map === null) return;
    const busy = () => wrapper.current?.removeAttribute('data-idle');
    const idle = () => wrapper.current?.setAttribute('data-idle', '');
    const look = () => {
      if (map.getSource(source) === undefined || !map.isSourceLoaded(source)) return;
      performance.mark(STATIONS_DRAWN);
      map.off('render', look);
    };
    map.on('render', look);
    map.on('render', busy);
    map.on('idle', idle);
    return () => {
      map.off('render', look);
      map.off('render', busy);
      map.off('idle', idle);
    };
  }, [map, wrapper, source]);
}
