import type { Map as MapLibreMap } from 'maplibre-gl';
import { type RefObject, useEffect } from 'react';

/** `data-idle` stands on the sheet while everything asked for is drawn: what a test waits for. */
export function useIdleMark(map: MapLibreMap | null, wrapper: RefObject<HTMLDivElement | null>): void {
  // After every change of what is to be drawn: not idle until the map has said so again.
  useEffect(() => {
    wrapper.current?.removeAttribute('data-idle');
    map?.triggerRepaint();
  });
  useEffect(() => {
    const busy = () => wrapper.current?.removeAttribute('data-idle');
    const idle = () => wrapper.current?.setAttribute('data-idle', '');
    map?.on('render', busy);
    map?.on('idle', idle);
    return () => {
      map?.off('render', busy);
      map?.off('idle', idle);
    };
  }, [map, wrapper]);
}
