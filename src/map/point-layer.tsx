import type { FeatureCollection, Point } from 'geojson';
import { useMemo } from 'react';
import { Layer, Source } from 'react-map-gl/maplibre';
import { POINT_CROSS } from './mark-pictures.ts';
import type { Position } from './sheet-place.ts';

/** A clicked position between the places: a small cross as a surveyor would pencil it. */
export function PointLayer({ point }: { readonly point: Position | null }) {
  const data = useMemo<FeatureCollection<Point>>(
    () => ({
      type: 'FeatureCollection',
      features:
        point === null
          ? []
          : [
              {
                type: 'Feature',
                properties: {},
                geometry: { type: 'Point', coordinates: [point.longitude, point.latitude] },
              },
            ],
    }),
    [point],
  );
  return (
    <Source id="point" type="geojson" data={data}>
      <Layer
        id="point-cross"
        type="symbol"
        layout={{ 'icon-image': POINT_CROSS, 'icon-allow-overlap': true, 'icon-ignore-placement': true }}
      />
    </Source>
  );
}
