import { useEffect } from 'react';
import { useMap } from 'react-map-gl/maplibre';
import type { RaisedPlace } from './place-features.ts';

/** Hides the ordinary names of raised places as a state of their features: a filter would lay every name out anew. */
export function useRaisedState(source: string, raised: readonly RaisedPlace[]): void {
  const map = useMap().current?.getMap();
  const ids = raised.map(({ place }) => place.id).join(' ');
  useEffect(() => {
    if (map === undefined || ids === '') return;
    const each = ids.split(' ');
    const isThere = () => map.getSource(source) !== undefined;
    if (isThere()) for (const id of each) map.setFeatureState({ source, id }, { raised: true });
    return () => {
      if (map.style !== undefined && isThere()) for (const id of each) map.removeFeatureState({ source, id }, 'raised');
    };
  }, [map, source, ids]);
}
