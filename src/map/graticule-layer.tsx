import type { Map as MapLibreMap } from 'maplibre-gl';
import { useMemo } from 'react';
import { Layer, Source } from 'react-map-gl/maplibre';
import { graticuleArea, graticuleLines } from './graticule.ts';
import { BELOW_NAMES } from './sheet-style.ts';
import type { SheetView } from './sheet-view.ts';
import { useSheetView } from './sheet-view-store.ts';

/** The thin lines of the graticule on the map, under its names. */
export function GraticuleLayer({ map }: { readonly map: MapLibreMap | null }) {
  const view = useSheetView(map);
  return view === null ? null : <GraticuleOf view={view} />;
}

function GraticuleOf({ view }: { readonly view: SheetView }) {
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
