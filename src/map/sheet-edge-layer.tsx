import type { Map as MapLibreMap } from 'maplibre-gl';
import { useMemo } from 'react';
import { Layer, Source } from 'react-map-gl/maplibre';
import { SHEET_EDGE, sheetEdges } from './sheet-edges.ts';
import type { SheetView } from './sheet-view.ts';
import { useSheetView } from './sheet-view-store.ts';
import type { Furniture } from './use-furniture.ts';

/** How far from the frame a name stays, px. */
const CLEAR_PX = 3;

interface EdgeProps {
  /** What stands over the map; its names keep clear of it. */
  readonly furniture: readonly Furniture[];
}

/**
 * Keeps names off the frame and out from under the furniture: unseen strips take the room, so that a name that would be cut
 * goes to another side of its mark or waits. MapLibre gives room to the last layer first; this one has to be the last.
 */
export function SheetEdgeLayer({ map, furniture }: EdgeProps & { readonly map: MapLibreMap | null }) {
  const view = useSheetView(map);
  return view === null ? null : <EdgesOf view={view} furniture={furniture} />;
}

function EdgesOf({ view, furniture }: EdgeProps & { readonly view: SheetView }) {
  const { west, east, north, south, widthPx, heightPx } = view;
  const data = useMemo(
    () => sheetEdges({ west, east, north, south, widthPx, heightPx }, furniture),
    [west, east, north, south, widthPx, heightPx, furniture],
  );
  const strip = (along: string, padding: [number, number, number, number]) => (
    <Layer
      key={along}
      id={`sheet-edge-${along}`}
      type="symbol"
      filter={['==', ['get', 'along'], along]}
      layout={{
        'icon-image': SHEET_EDGE,
        'icon-allow-overlap': true,
        'icon-ignore-placement': false,
        'icon-padding': padding,
      }}
    />
  );
  return (
    <Source id="sheet-edges" type="geojson" data={data}>
      {strip('parallel', [CLEAR_PX, widthPx / 2, CLEAR_PX, widthPx / 2])}
      {strip('meridian', [heightPx / 2, CLEAR_PX, heightPx / 2, CLEAR_PX])}
      {furniture.map(({ width, height }, index) =>
        strip(`furniture-${index}`, [height / 2, width / 2, height / 2, width / 2]),
      )}
    </Source>
  );
}
