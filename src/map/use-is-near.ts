import { useEffect, useState } from 'react';
import { useMap } from 'react-map-gl/maplibre';

/** Before the zoom itself, so that what is drawn from it on is there in time. */
const EARLY = 0.5;

/** Whether the map is about as near as `zoom` or nearer: what is drawn from there on has to be made only then. */
export function useIsNear(zoom: number): boolean {
  const map = useMap().current?.getMap();
  const [isNear, setNear] = useState(false);
  useEffect(() => {
    if (map === undefined) return;
    const look = () => setNear(map.getZoom() >= zoom - EARLY);
    look();
    map.on('zoom', look);
    return () => {
      map.off('zoom', look);
    };
  }, [map, zoom]);
  return isNear;
}
