import type { ExpressionSpecification } from 'maplibre-gl';
import { useEffect, useMemo, useState } from 'react';
import { Layer, Source, useMap } from 'react-map-gl/maplibre';
import { RAMP_STOPS } from '../charts/ramp.ts';
import type { SurfaceCells } from '../contract/surface.ts';
import { ROMAN } from './map-fonts.ts';
import { BELOW_LINES, BELOW_NAMES } from './sheet-style.ts';
import { useSheetView } from './sheet-view-store.ts';
import { cellCorners, surfaceHexagons } from './surface-hexagons.ts';
import { surfaceLines } from './surface-lines.ts';
import { type SurfaceMesh, surfaceMesh, surfaceScores } from './surface-mesh.ts';
import { surfacePainter } from './surface-painter.ts';
import { drawWeave, WEAVE } from './surface-weave.ts';
import { useRested } from './use-rested.ts';

interface SurfaceLayerProps {
  /** Kept by its asker: the same object draws the same cells. */
  readonly cells: SurfaceCells;
  /** Scores by cell as they come. */
  readonly scores: string;
}

/** From here on the cells themselves are drawn. */
const CELLS_FROM_ZOOM = 8.5;
/** Lines are cut and laid out anew when a slider rests for so long; the bands follow it at once. */
const REST_MS = 200;
/** The box of the cells grows by so many degrees at a time, so that it stays the same while the map moves a little. */
const STEP = 0.5;
const MARGIN = 0.1;
const BAND = 'surface-band';
const LINE = 'surface-line';
const INK = '#22302f';
const HALO = '#f4f0e6';

const RAMP_OF_SCORE: ExpressionSpecification = [
  'interpolate',
  ['linear'],
  ['get', 'score'],
  ...RAMP_STOPS.flatMap(({ share, colour }) => [100 * share, colour]),
];

/**
 * The score between stations: isopleth bands with small figures on the lines, and a looser weave where stations are far. Only far in are
 * the cells themselves shown.
 */
export function SurfaceLayer({ cells, scores }: SurfaceLayerProps) {
  const mesh = useMemo(() => surfaceMesh(cells), [cells]);
  const values = useMemo(() => surfaceScores(scores), [scores]);
  const drawn = useRested(
    useMemo(() => ({ mesh, values }), [mesh, values]),
    REST_MS,
  );
  const lines = useMemo(() => surfaceLines(drawn.mesh, drawn.values), [drawn]);
  usePaintedBands(mesh, values);
  return (
    <>
      <SurfaceCellsLayer mesh={mesh} values={values} />
      <Source id="surface-lines" type="geojson" data={lines} tolerance={0.2}>
        <Layer
          id={LINE}
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

/**
 * The bands themselves, under the lines. Given to the map when everything stands: what is given while React draws may be drawn
 * twice, and the map would keep the painter that nobody tells of scores.
 */
function usePaintedBands(mesh: SurfaceMesh, values: Float32Array): void {
  const map = useMap().current?.getMap();
  const painter = useMemo(() => surfacePainter(BAND, CELLS_FROM_ZOOM), []);
  useEffect(() => painter.show(mesh, values), [painter, mesh, values]);
  useEffect(() => {
    if (map === undefined) return;
    const put = () => {
      const above = [LINE, BELOW_LINES].find((id) => map.getLayer(id) !== undefined);
      if (above !== undefined && map.getLayer(BAND) === undefined) map.addLayer(painter.layer, above);
    };
    put();
    map.on('styledata', put);
    return () => {
      map.off('styledata', put);
      if (map.style !== undefined && map.getLayer(BAND) !== undefined) map.removeLayer(BAND);
    };
  }, [map, painter]);
}

interface SurfaceCellsProps {
  readonly mesh: SurfaceMesh;
  readonly values: Float32Array;
}

/** Only what the view shows becomes polygons: all cells of a continent would be tens of thousands. */
function SurfaceCellsLayer({ mesh, values }: SurfaceCellsProps) {
  const hasWeave = useWeave();
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
        paint={{ 'fill-color': RAMP_OF_SCORE, 'fill-outline-color': 'rgba(34, 48, 47, 0.25)' }}
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
