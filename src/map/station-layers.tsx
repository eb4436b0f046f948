import type { ExpressionSpecification, FilterSpecification, SymbolLayerSpecification } from 'maplibre-gl';
import { useMemo } from 'react';
import { Layer, Source } from 'react-map-gl/maplibre';
import type { MapStation } from '../contract/programme-map.ts';
import { MEDIUM, ROMAN } from './map-fonts.ts';
import { stationFeatures } from './station-features.ts';

/** The layer whose marks can be pointed at. */
export const STATION_MARKS = 'station-mark';

const INK = '#22302f';
const PAPER = '#fbf9f3';
const NOBODY = '';
/** With more stations than this, names wait until the map is near enough to have room for them. */
const MOST_NAMED = 300;
const NAMES_FROM_ZOOM = 5;

/** Where a name may stand beside its mark, the best first; the corners find room at the frame and in a crowd. */
const SIDES: NonNullable<NonNullable<SymbolLayerSpecification['layout']>['text-variable-anchor']> = [
  'left',
  'right',
  'top',
  'bottom',
  'bottom-left',
  'top-left',
  'bottom-right',
  'top-right',
];

type StationLayersProps = {
  readonly stations: readonly MapStation[];
  readonly chosenId: string | null;
  /** The station under the pointer or under the keyboard's cursor. */
  readonly pointedId: string | null;
};

/**
 * Stations as open survey triangles with their score beside them; the chosen one ringed, the pointed one named.
 * MapLibre gives room to the last layer first: names therefore stand before the marks, and keep clear of them.
 */
export function StationLayers({ stations, chosenId, pointedId }: StationLayersProps) {
  const data = useMemo(() => stationFeatures(stations), [stations]);
  const isChosen: FilterSpecification = ['==', ['get', 'id'], chosenId ?? NOBODY];
  const isPointed: FilterSpecification = ['==', ['get', 'id'], pointedId ?? NOBODY];
  return (
    <Source id="stations" type="geojson" data={data}>
      <Layer
        id="station-pointed"
        type="circle"
        filter={isPointed}
        paint={{
          'circle-radius': 13,
          'circle-color': PAPER,
          'circle-opacity': 0.7,
          'circle-stroke-color': INK,
          'circle-stroke-width': 1,
        }}
      />
      <Layer
        id="station-chosen"
        type="circle"
        filter={isChosen}
        paint={{
          'circle-radius': 13.5,
          'circle-color': PAPER,
          'circle-opacity': 0.85,
          'circle-stroke-color': INK,
          'circle-stroke-width': 2,
        }}
      />
      <Layer
        id="station-name"
        type="symbol"
        minzoom={stations.length > MOST_NAMED ? NAMES_FROM_ZOOM : 0}
        filter={['!', ['in', ['get', 'id'], ['literal', [chosenId ?? NOBODY, pointedId ?? NOBODY]]]]}
        layout={{
          'text-field': nameAndFigure,
          'text-font': [ROMAN],
          'text-size': 12.5,
          'text-variable-anchor': SIDES,
          'text-radial-offset': 1.15,
          'text-justify': 'auto',
          'text-line-height': 1.1,
          'text-padding': 2,
        }}
        paint={{ 'text-color': INK, 'text-halo-color': PAPER, 'text-halo-width': 1.5 }}
      />
      <Layer
        id={STATION_MARKS}
        type="symbol"
        layout={{
          'icon-image': ['get', 'mark'],
          'icon-size': ['interpolate', ['linear'], ['zoom'], 1, 0.6, 4, 0.9, 5, 1],
          'icon-allow-overlap': true,
          'icon-ignore-placement': false,
          'icon-padding': 0,
          'symbol-sort-key': ['get', 'order'],
        }}
      />
      <Layer
        id="station-name-raised"
        type="symbol"
        filter={['any', isChosen, isPointed]}
        layout={{
          'text-field': nameAndFigure,
          'text-font': [MEDIUM],
          'text-size': 14,
          'text-variable-anchor': SIDES,
          'text-radial-offset': 1.2,
          'text-justify': 'auto',
          'text-line-height': 1.1,
          'text-allow-overlap': true,
          'text-ignore-placement': false,
        }}
        paint={{ 'text-color': INK, 'text-halo-color': PAPER, 'text-halo-width': 2 }}
      />
    </Source>
  );
}

/** The name, and the score under it as a sheet prints a height under a summit. */
const nameAndFigure: ExpressionSpecification = [
  'case',
  ['==', ['get', 'figure'], ''],
  ['get', 'name'],
  ['format', ['get', 'name'], {}, '\n', {}, ['get', 'figure'], {}],
];
