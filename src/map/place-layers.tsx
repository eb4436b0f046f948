import type {
  DataDrivenPropertyValueSpecification,
  ExpressionSpecification,
  SymbolLayerSpecification,
} from 'maplibre-gl';
import { useMemo } from 'react';
import { Layer, Source } from 'react-map-gl/maplibre';
import { MEDIUM, ROMAN } from './map-fonts.ts';
import { fieldName } from './mark-pictures.ts';
import { figureFeatures, markFeatures, nameFeatures, type RaisedPlace, raisedFeatures } from './place-features.ts';
import type { MarkInks, PlaceKind, SheetPlace } from './sheet-place.ts';
import { useIsNear } from './use-is-near.ts';
import { HOLLOW } from './use-mark-inks.ts';
import { useRaisedState } from './use-raised-state.ts';

/** The layers whose marks can be pointed at. */
export const MARK_LAYERS: Readonly<Record<PlaceKind, string>> = { station: 'station-mark', site: 'site-mark' };
/** The sources whose features carry the colour of their mark as a state. */
export const MARK_SOURCES: Readonly<Record<PlaceKind, string>> = { station: 'stations', site: 'sites' };

const INK = '#22302f';
const PAPER = '#fbf9f3';
/** With more places than this, names wait until the map is near enough to have room for them. */
export const MOST_NAMED = 300;
const NAMES_FROM_ZOOM = 5;
const NOBODY: readonly SheetPlace[] = [];
/** Letters are a size that can be read from here on; with few sites they always stand. */
const LETTERS_FROM_ZOOM = 4;

type Layout = NonNullable<SymbolLayerSpecification['layout']>;

/** Where a name may stand beside its mark, the best first; the corners find room at the frame and in a crowd. */
const SIDES: NonNullable<Layout['text-variable-anchor']> = [
  ...(['left', 'right', 'top', 'bottom'] as const),
  ...(['bottom-left', 'top-left', 'bottom-right', 'top-right'] as const),
];

const SIZE: DataDrivenPropertyValueSpecification<number> = ['interpolate', ['linear'], ['zoom'], 1, 0.6, 4, 0.9, 5, 1];
/** Thousands of marks on the whole world would be a blot: they grow as the map comes nearer. */
const SIZE_OF_MANY: DataDrivenPropertyValueSpecification<number> = [
  'interpolate',
  ['linear'],
  ['zoom'],
  ...[1, 0.32, 3, 0.5, 5, 0.8, 7, 1],
];
const COLOUR: ExpressionSpecification = ['coalesce', ['feature-state', 'colour'], HOLLOW];

interface MarksProps {
  readonly kind: PlaceKind;
  readonly places: readonly SheetPlace[];
}

/** The marks of one kind: a field in the colour of the layer, and the ink over it. */
export function PlaceMarks({ kind, places }: MarksProps) {
  const data = useMemo(() => markFeatures(kind, places), [kind, places]);
  const isMany = places.length > MOST_NAMED;
  const layout: Layout = {
    'icon-size': isMany ? SIZE_OF_MANY : SIZE,
    'icon-allow-overlap': true,
    'icon-padding': 0,
  };
  const source = MARK_SOURCES[kind];
  return (
    <Source id={source} type="geojson" data={data} promoteId="id">
      <Layer
        id={`${kind}-field`}
        type="symbol"
        layout={{ ...layout, 'icon-image': fieldName(kind), 'icon-ignore-placement': true }}
        paint={{ 'icon-color': COLOUR }}
      />
      <Layer
        id={MARK_LAYERS[kind]}
        type="symbol"
        layout={{ ...layout, 'icon-image': ['get', 'ink'], 'icon-ignore-placement': false }}
      />
      {kind === 'site' ? <Letters minzoom={isMany ? LETTERS_FROM_ZOOM : 0} /> : null}
    </Source>
  );
}

function Letters({ minzoom }: { readonly minzoom: number }) {
  return (
    <Layer
      id="site-letters"
      source={MARK_SOURCES.site}
      type="symbol"
      minzoom={minzoom}
      layout={{
        'text-field': ['get', 'letters'],
        'text-font': [MEDIUM],
        'text-size': ['interpolate', ['linear'], ['zoom'], 1, 6.5, 4, 10, 5, 11],
        'text-allow-overlap': true,
        'text-ignore-placement': true,
        'text-padding': 0,
      }}
      paint={{ 'text-color': INK }}
    />
  );
}

interface NamesProps extends MarksProps {
  /** Drawn larger elsewhere: their own names make room. */
  readonly raised: readonly RaisedPlace[];
}

/**
 * Names beside their marks. MapLibre gives room to the last layer first: names therefore stand before figures and marks, and keep
 * clear of them.
 */
export function PlaceNames({ kind, places, raised }: NamesProps) {
  const isNear = useIsNear(NAMES_FROM_ZOOM);
  const shown = places.length > MOST_NAMED && !isNear ? NOBODY : places;
  const data = useMemo(() => nameFeatures(shown), [shown]);
  const source = `${kind}-names`;
  useRaisedState(source, raised);
  return (
    <Source id={source} type="geojson" data={data} promoteId="id">
      <Layer
        id={`${kind}-name`}
        type="symbol"
        minzoom={places.length > MOST_NAMED ? NAMES_FROM_ZOOM : 0}
        layout={{
          'text-field': ['get', 'name'],
          'text-font': [ROMAN],
          'text-size': ['interpolate', ['linear'], ['zoom'], 3, 11, 5, 12.5],
          'text-variable-anchor': SIDES,
          'text-radial-offset': 1.05,
          'text-justify': 'auto',
          'text-line-height': 1.1,
          'text-max-width': 8,
          'text-padding': 1,
        }}
        paint={{
          'text-color': INK,
          'text-halo-color': PAPER,
          'text-halo-width': 1.5,
          'text-opacity': ['case', ['boolean', ['feature-state', 'raised'], false], 0, 1],
        }}
      />
    </Source>
  );
}

interface FiguresProps extends MarksProps {
  readonly inks: MarkInks;
}

/** The figure of the layer under each mark, as a sheet prints a height: small, so that most of them find room in a crowd. */
export function PlaceFigures({ kind, places, inks }: FiguresProps) {
  const isNear = useIsNear(NAMES_FROM_ZOOM);
  const shown = places.length > MOST_NAMED && !isNear ? NOBODY : places;
  const data = useMemo(() => figureFeatures(shown, inks), [shown, inks]);
  return (
    <Source id={`${kind}-figures`} type="geojson" data={data}>
      <Layer
        id={`${kind}-figure`}
        type="symbol"
        minzoom={places.length > MOST_NAMED ? NAMES_FROM_ZOOM : 0}
        layout={{
          'text-field': ['get', 'figure'],
          'text-font': [ROMAN],
          'text-size': 11,
          'text-anchor': 'top',
          'text-offset': [0, 1.12],
          'text-padding': 0,
        }}
        paint={{ 'text-color': INK, 'text-halo-color': PAPER, 'text-halo-width': 1.5 }}
      />
    </Source>
  );
}

interface RaisedProps {
  readonly raised: readonly RaisedPlace[];
  readonly inks: MarkInks;
}

/** The ring round the chosen place and round the pointed one; under the marks. */
export function RaisedRings({ raised, inks }: RaisedProps) {
  const data = useMemo(() => raisedFeatures(raised, inks), [raised, inks]);
  return (
    <Source id="raised" type="geojson" data={data}>
      <Layer
        id="raised-ring"
        type="circle"
        paint={{
          'circle-radius': ['case', ['==', ['get', 'kind'], 'site'], 16, 13.5],
          'circle-color': PAPER,
          'circle-opacity': 0.85,
          'circle-stroke-color': INK,
          'circle-stroke-width': ['case', ['==', ['get', 'how'], 'pointed'], 1, 2],
        }}
      />
    </Source>
  );
}

/** Their names, larger, over everything, and the mark of a site that is held; from the source of the rings. */
export function RaisedNames() {
  return (
    <>
      <Layer
        id="raised-mark"
        type="symbol"
        source="raised"
        filter={['==', ['get', 'how'], 'held']}
        layout={{ 'icon-image': ['get', 'ink'], 'icon-allow-overlap': true, 'icon-ignore-placement': true }}
      />
      <Layer
        id="raised-name"
        type="symbol"
        source="raised"
        layout={{
          'text-field': nameAndFigure,
          'text-font': [MEDIUM],
          'text-size': 14,
          'text-variable-anchor': SIDES,
          'text-radial-offset': 1.25,
          'text-justify': 'auto',
          'text-line-height': 1.1,
          'text-allow-overlap': true,
          'text-ignore-placement': false,
        }}
        paint={{ 'text-color': INK, 'text-halo-color': PAPER, 'text-halo-width': 2 }}
      />
    </>
  );
}

/** The name, and the figure under it as a sheet prints a height under a summit. */
const nameAndFigure: ExpressionSpecification = [
  'case',
  ['==', ['get', 'figure'], ''],
  ['get', 'name'],
  ['format', ['get', 'name'], {}, '\n', {}, ['get', 'figure'], {}],
];
