import { useMemo } from 'react';
import { Layer, Source } from 'react-map-gl/maplibre';
import { graticuleArea, graticuleLines } from './graticule.ts';
import { BELOW_NAMES } from './sheet-style.ts';
import type { SheetView } from './sheet-view.ts';

/** The thin lines of the graticule on the map, under its names. */
export function GraticuleLayer({ view }: { readonly view: SheetView }) {
  const { stepMinutes, west, east, south, north } = graticuleArea(view);
  const lines = useMemo(
    () => graticuleLines({ stepMinutes, west, east, south, north }),
    [stepMinutes, west, east, south, north],
  );
  return (
    <Source id="graticule" type="geojson" data={lines}>
      <Layer
        id="graticule"
        type="line"
        beforeId={BELOW_NAMES}
        paint={{ 'line-color': '#22302f', 'line-opacity': 0.13, 'line-width': 0.75 }}
      />
    </Source>
  );
}
