import type { MapLayerMouseEvent } from 'react-map-gl/maplibre';
import { MARK_LAYERS } from './place-layers.tsx';
import type { PlaceKind, PlaceRef } from './sheet-place.ts';

/** A finger or a pointer this near to a mark means it. */
const REACH_PX = 10;
const KINDS: readonly PlaceKind[] = ['site', 'station'];

/** The place under the pointer, the nearest where several are in reach. */
export function placeAt({ target: map, point }: Pick<MapLayerMouseEvent, 'target' | 'point'>): PlaceRef | null {
  const box: [[number, number], [number, number]] = [
    [point.x - REACH_PX, point.y - REACH_PX],
    [point.x + REACH_PX, point.y + REACH_PX],
  ];
  let nearest: (PlaceRef & { distance: number }) | null = null;
  for (const kind of KINDS) {
    const layer = MARK_LAYERS[kind];
    if (map.getLayer(layer) === undefined) continue;
    for (const { geometry, properties } of map.queryRenderedFeatures(box, { layers: [layer] })) {
      if (geometry.type !== 'Point') continue;
      const [longitude = 0, latitude = 0] = geometry.coordinates;
      const distance = map.project([longitude, latitude]).dist(point);
      if (nearest === null || distance < nearest.distance) nearest = { kind, id: String(properties.id), distance };
    }
  }
  return nearest === null ? null : { kind: nearest.kind, id: nearest.id };
}
