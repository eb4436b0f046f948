import type { FeatureCollection, Point } from 'geojson';
import type { SheetView } from './sheet-view.ts';

/** The picture of an edge: nothing to see, but names find no room where it lies. */
export const SHEET_EDGE = 'sheet-edge';

type Edge = { readonly along: 'parallel' | 'meridian' };

/** The middles of the four edges of the view: two that run along parallels, two along meridians. */
export function sheetEdges(view: SheetView): FeatureCollection<Point, Edge> {
  const { west, east, north, south } = view;
  const middle = (west + east) / 2;
  const half = middleParallel(view);
  const edge = (along: Edge['along'], coordinates: [number, number]) => ({
    type: 'Feature' as const,
    properties: { along },
    geometry: { type: 'Point' as const, coordinates },
  });
  return {
    type: 'FeatureCollection',
    features: [
      edge('parallel', [middle, north]),
      edge('parallel', [middle, south]),
      edge('meridian', [west, half]),
      edge('meridian', [east, half]),
    ],
  };
}

/** The parallel half way down the sheet, which on Mercator's is not half way in degrees. */
function middleParallel({ north, south }: SheetView): number {
  const height = (degrees: number): number => Math.asinh(Math.tan((degrees * Math.PI) / 180));
  return (Math.atan(Math.sinh((height(north) + height(south)) / 2)) * 180) / Math.PI;
}
