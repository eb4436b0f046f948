import type { FeatureCollection, Point } from 'geojson';
import { latitudeAt, longitudeAt, type SheetView } from './sheet-view.ts';
import type { Furniture } from './use-furniture.ts';

/** The picture of an edge: nothing to see, but names find no room where it lies. */
export const SHEET_EDGE = 'sheet-edge';

/** Which strip a feature is the middle of: an edge of the frame, or a piece of furniture by its number. */
type Strip = { readonly along: string };

/** The middles of the four edges of the view (two run along parallels, two along meridians), and of the furniture. */
export function sheetEdges(view: SheetView, furniture: readonly Furniture[] = []): FeatureCollection<Point, Strip> {
  const { west, east, north, south } = view;
  const middle = (west + east) / 2;
  const half = latitudeAt(view, view.heightPx / 2);
  const strip = (along: string, coordinates: [number, number]) => ({
    type: 'Feature' as const,
    properties: { along },
    geometry: { type: 'Point' as const, coordinates },
  });
  return {
    type: 'FeatureCollection',
    features: [
      strip('parallel', [middle, north]),
      strip('parallel', [middle, south]),
      strip('meridian', [west, half]),
      strip('meridian', [east, half]),
      ...furniture.map(({ left, top, width, height }, index) =>
        strip(`furniture-${index}`, [longitudeAt(view, left + width / 2), latitudeAt(view, top + height / 2)]),
      ),
    ],
  };
}
