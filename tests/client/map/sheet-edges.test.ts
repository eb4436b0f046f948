import { describe, expect, it } from 'vitest';
import { sheetEdges } from '../../../src/map/sheet-edges.ts';
import { meridianX, parallelY, type SheetView } from '../../../src/map/sheet-view.ts';

const VIEWS: readonly SheetView[] = [
  { west: 9, east: 43, south: -35, north: -15, widthPx: 850, heightPx: 540 },
  { west: -20, east: 60, south: -60, north: 75, widthPx: 355, heightPx: 524 },
  { west: 170, east: 200, south: -20, north: 5, widthPx: 355, heightPx: 524 },
];

describe('the edges of a sheet', () => {
  it.each(VIEWS)('lie at the middles of its four sides ($west to $east°)', (view) => {
    const { widthPx, heightPx } = view;
    const placed = sheetEdges(view).features.map(({ properties, geometry: { coordinates } }) => {
      const [longitude = 0, latitude = 0] = coordinates;
      return [properties.along, Math.round(meridianX(view, longitude)), Math.round(parallelY(view, latitude))];
    });
    const middle = { x: Math.round(widthPx / 2), y: Math.round(heightPx / 2) };
    expect(placed).toEqual([
      ['parallel', middle.x, 0],
      ['parallel', middle.x, heightPx],
      ['meridian', 0, middle.y],
      ['meridian', widthPx, middle.y],
    ]);
  });

  it.each(VIEWS)('keep names out from under what stands over the map ($west to $east°)', (view) => {
    const furniture = [{ left: 300, top: 12, width: 34, height: 100 }];
    const strip = sheetEdges(view, furniture).features.at(-1);
    const [longitude = 0, latitude = 0] = strip?.geometry.coordinates ?? [];
    expect(strip?.properties.along).toBe('furniture-0');
    expect(meridianX(view, longitude)).toBeCloseTo(317, 6);
    expect(parallelY(view, latitude)).toBeCloseTo(62, 6);
  });
});
