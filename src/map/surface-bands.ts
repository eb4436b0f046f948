import type { Feature, FeatureCollection, LineString, MultiPolygon } from 'geojson';
import { polygonsOf } from './ring-polygons.ts';
import { contourAt } from './surface-contours.ts';
import type { SurfaceMesh } from './surface-mesh.ts';

/** Points of the score from one isopleth to the next. */
export const BAND_POINTS = 10;
const HIGHEST = 100;

export interface BandProperties {
  /** Points from which the band runs to the next one. */
  readonly from: number;
  readonly middle: number;
}

export interface SurfaceBands {
  /** Each band is all that lies at or above its start: they are painted one over another, the lowest first. */
  readonly bands: FeatureCollection<MultiPolygon, BandProperties>;
  readonly lines: FeatureCollection<LineString, { readonly value: number }>;
}

/** The isopleth bands of a surface, and the lines between them. */
export function surfaceBands(mesh: SurfaceMesh, scores: Float32Array): SurfaceBands {
  const bands: Feature<MultiPolygon, BandProperties>[] = [];
  const lines: Feature<LineString, { readonly value: number }>[] = [];
  for (let from = 0; from < HIGHEST; from += BAND_POINTS) {
    const contour = contourAt(mesh, scores, from);
    if (contour.rings.length === 0) break;
    bands.push({
      type: 'Feature',
      properties: { from, middle: from + BAND_POINTS / 2 },
      geometry: { type: 'MultiPolygon', coordinates: polygonsOf(contour.rings) },
    });
    if (from === 0) continue;
    for (const line of contour.lines) {
      lines.push({
        type: 'Feature',
        properties: { value: from },
        geometry: { type: 'LineString', coordinates: [...line] },
      });
    }
  }
  return {
    bands: { type: 'FeatureCollection', features: bands },
    lines: { type: 'FeatureCollection', features: lines },
  };
}

const PALE = 1;
const HALF = 0.5;

/** Where stations lie so far that the surface is in doubt: drawn over the bands as a looser weave. */
export function paleArea(mesh: SurfaceMesh): Feature<MultiPolygon> {
  // On the rim there is nothing, so that the weave ends where the surface does.
  const field = Float32Array.from(mesh.support, (support) => (support === 0 ? Number.NaN : support === PALE ? 1 : 0));
  const { rings } = contourAt(mesh, field, HALF);
  return { type: 'Feature', properties: {}, geometry: { type: 'MultiPolygon', coordinates: polygonsOf(rings) } };
}
