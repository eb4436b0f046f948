import type { ExpressionSpecification } from 'maplibre-gl';
import { useEffect, useMemo, useState } from 'react';
import { Layer, Source, useMap } from 'react-map-gl/maplibre';
import { RAMP_STOPS } from '../charts/ramp.ts';
import type { SurfaceCells } from '../contract/surface.ts';
import { ROMAN } from './map-fonts.ts';
import { BELOW_LINES, BELOW_NAMES } from './sheet-style.ts';
import { useSheetView } from './sheet-view-store.ts';
import { paleArea, surfaceBands } from './surface-bands.ts';
import { cellCorners, surfaceHexagons } from './surface-hexagons.ts';
import { type SurfaceMesh, surfaceMesh, surfaceScores } from './surface-mesh.ts';
import { drawWeave, WEAVE } from './surface-weave.ts';

interface SurfaceLayerProps {
  /** Kept by its asker: the same object draws the same cells. */
  readonly cells: SurfaceCells;
  /** Scores by cell as they come. */
  readonly scores: string;
}

/** From here on the cells themselves are drawn. */
const CELLS_FROM_ZOOM = 8.5;
/** The box of the cells grows by so many degrees at a time, so that it stays the same while the map moves a little. */
const STEP = 0.5;
const MARGIN = 0.1;
const INK = '#22302f';
const HALO = '#f4f0e6';

const rampOf = (figure: string): ExpressionSpecification => [
  'interpolate',
  ['linear'],
  ['get', figure],
  ...RAMP_STOPS.flatMap(({ share, colour }) => [100 * share, colour]),
];

/**
 * The score between stations: isopleth bands with small figures on the lines, and a looser weave where stations are far. Only far in are
 * the cells themselves shown.
 */
export function SurfaceLayer({ cells, scores }: SurfaceLayerProps) {
  const mesh = useMemo(() => surfaceMesh(cells), [cells]);
  const values = useMemo(() => surfaceScores(scores), [scores]);
  const { bands, lines } = useMemo(() => surfaceBands(mesh, values), [mesh, values]);
  const pale = useMemo(() => paleArea(mesh), [mesh]);
  const hasWeave = useWeave();
  return (
    <>
      <Source id="surface-bands" type="geojson" data={bands} tolerance={0.2}>
        <Layer
          id="surface-band"
          type="fill"
          beforeId={BELOW_LINES}
          maxzoom={CELLS_FROM_ZOOM}
          layout={{ 'fill-sort-key': ['get', 'from'] }}
          paint={{ 'fill-color': rampOf('middle'), 'fill-antialias': false }}
        />
      </Source>
      <SurfaceCellsLayer mesh={mesh} values={values} hasWeave={hasWeave} />
      {hasWeave ? (
        <Source id="surface-pale" type="geojson" data={pale} tolerance={0.2}>
          <Layer
            id="surface-pale"
            type="fill"
            beforeId={BELOW_LINES}
            maxzoom={CELLS_FROM_ZOOM}
            paint={{ 'fill-pattern': WEAVE }}
          />
        </Source>
      ) : null}
      <Source id="surface-lines" type="geojson" data={lines} tolerance={0.2}>
        <Layer
          id="surface-line"
          type="line"
          beforeId={BELOW_LINES}
          maxzoom={CELLS_FROM_ZOOM}
          layout={{ 'line-join': 'round' }}
          paint={{ 'line-color': INK, 'line-opacity': 0.38, 'line-width': 0.7 }}
        />
        <Layer
          id="surface-figure"
          type="symbol"
          beforeId={BELOW_NAMES}
          maxzoom={CELLS_FROM_ZOOM}
          layout={{
            'symbol-placement': 'line',
            'symbol-spacing': 220,
            'text-field': ['to-string', ['get', 'value']],
            'text-font': [ROMAN],
            'text-size': 10.5,
            'text-padding': 3,
            'text-max-angle': 40,
          }}
          paint={{ 'text-color': INK, 'text-halo-color': HALO, 'text-halo-width': 1.3 }}
        />
      </Source>
    </>
  );
}

interface SurfaceCellsProps {
  readonly mesh: SurfaceMesh;
  readonly values: Float32Array;
  readonly hasWeave: boolean;
}

/** Only what the view shows becomes polygons: all cells of a continent would be tens of thousands. */
function SurfaceCellsLayer({ mesh, values, hasWeave }: SurfaceCellsProps) {
  const map = useMap().current?.getMap() ?? null;
  const view = useSheetView(map);
  const isNear = (map?.getZoom() ?? 0) >= CELLS_FROM_ZOOM - 0.1;
  const corners = useMemo(() => (isNear ? cellCorners(mesh) : null), [mesh, isNear]);
  const west = stepDown(view?.west ?? 0);
  const south = stepDown(view?.south ?? 0);
  const east = -stepDown(-(view?.east ?? 0));
  const north = -stepDown(-(view?.north ?? 0));
  const data = useMemo(() => {
    const box = { west, south, east, north };
    return corners === null ? null : surfaceHexagons(mesh, { corners, scores: values, box });
  }, [mesh, corners, values, west, south, east, north]);
  if (data === null) return null;
  return (
    <Source id="surface-cells" type="geojson" data={data}>
      <Layer
        id="surface-cell"
        type="fill"
        beforeId={BELOW_LINES}
        minzoom={CELLS_FROM_ZOOM}
        paint={{ 'fill-color': rampOf('score'), 'fill-outline-color': 'rgba(34, 48, 47, 0.25)' }}
      />
      {hasWeave ? (
        <Layer
          id="surface-cell-pale"
          type="fill"
          beforeId={BELOW_LINES}
          minzoom={CELLS_FROM_ZOOM}
          filter={['get', 'pale']}
          paint={{ 'fill-pattern': WEAVE }}
        />
      ) : null}
    </Source>
  );
}

function stepDown(degrees: number): number {
  return Math.floor((degrees - MARGIN) / STEP) * STEP;
}

/** Gives the map the picture of the weave; a pattern that comes later is never drawn. */
function useWeave(): boolean {
  const map = useMap().current?.getMap() ?? null;
  const [given, setGiven] = useState(false);
  useEffect(() => {
    if (map === null) return;
    const pixelRatio = Math.max(2, window.devicePixelRatio);
    if (!map.hasImage(WEAVE)) map.addImage(WEAVE, drawWeave(pixelRatio), { pixelRatio });
    setGiven(true);
  }, [map]);
  return given;
}
