import type { Feature, FeatureCollection, LineString } from 'geojson';
import { contourAt } from './surface-contours.ts';
import type { SurfaceMesh } from './surface-mesh.ts';

/** Points of the score from one isopleth to the next. */
export const BAND_POINTS = 10;
const HIGHEST = 100;

export type IsoplethLines = FeatureCollection<LineString, { readonly value: number }>;

/** The isopleths between the bands of a surface. */
export function surfaceLines(mesh: SurfaceMesh, scores: Float32Array): IsoplethLines {
  const features: Feature<LineString, { readonly value: number }>[] = [];
  for (let value = BAND_POINTS; value < HIGHEST; value += BAND_POINTS) {
    const { lines, rings } = contourAt(mesh, scores, value);
    if (rings.length === 0) break;
    for (const line of lines) {
      features.push({
        type: 'Feature',
        properties: { value },
        geometry: { type: 'LineString', coordinates: [...line] },
      });
    }
  }
  return { type: 'FeatureCollection', features };
}
