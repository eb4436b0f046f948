import type { FontFacesSpecification, LayerSpecification, StyleSpecification } from 'maplibre-gl';
import { reliefTiles } from './relief-tiles.ts';

/** Colours of the printed sheet; MapLibre reads no CSS variables, so the ones it needs stand here. */
export const SHEET = {
  water: '#dfe5e3',
  land: '#f0ebdf',
  coast: '#5f7377',
  border: '#8d8676',
  waterName: '#62797d',
  countryName: '#6b675a',
  placeName: '#5c5b51',
  halo: '#f4f0e6',
} as const;

/** What lies under relief, borders, coast and names (a surface, its cells) is put before this layer. */
export const BELOW_LINES = 'relief-shading';
/** What lies under names but over lines is put before this layer. */
export const BELOW_NAMES = 'water-name';

/** Pictures of towns, which the map's owner draws when they are first asked for. */
export const TOWN_DOT = 'town';
export const CAPITAL_DOT = 'capital';

const SOURCE = 'base';
const RELIEF = 'relief';
/** Zooms of the heights that the server tells; beyond the last they are enlarged. */
const RELIEF_ZOOMS = { minzoom: 2, maxzoom: 5 } as const;
const RELIEF_END = 9;
/** The largest zoom of the shipped tiles; beyond it the client enlarges them. */
const TILE_ZOOM = 7;

export type SheetStyleOptions = {
  /** Where the tiles come from: our own origin. */
  readonly origin: string;
  readonly fonts: FontFacesSpecification;
  /** Names of the faces, by part. */
  readonly faces: { readonly roman: string; readonly italic: string };
};

/** The base map as a printed sheet: paper, a thin coast, dash-dot borders and quiet names. */
export function sheetStyle({ origin, fonts, faces }: SheetStyleOptions): StyleSpecification {
  return {
    version: 8,
    'font-faces': fonts,
    sources: {
      [SOURCE]: { type: 'vector', tiles: [`${origin}/tiles/{z}/{x}/{y}.mvt`], maxzoom: TILE_ZOOM },
      [RELIEF]: {
        type: 'raster',
        tiles: [reliefTiles(origin)],
        // A pixel for about each node of the grid of heights; four times as many would show no more.
        tileSize: 512,
        ...RELIEF_ZOOMS,
      },
    },
    layers: [...groundLayers(), shading(), ...lineLayers(), waterNames(faces.italic), ...landNames(faces.roman)],
  };
}

function groundLayers(): LayerSpecification[] {
  return [
    { id: 'water', type: 'background', paint: { 'background-color': SHEET.water } },
    {
      id: 'land',
      type: 'fill',
      source: SOURCE,
      'source-layer': 'land',
      // The coast line covers the edge; a soft edge would draw a seam where the data were cut at 180°.
      paint: { 'fill-color': SHEET.land, 'fill-antialias': false },
    },
  ];
}

/** The shaded ground; far in it ends, as there is no height between the nodes of a grid of five minutes of arc. */
function shading(): LayerSpecification {
  return {
    id: BELOW_LINES,
    type: 'raster',
    source: RELIEF,
    maxzoom: RELIEF_END,
    paint: {
      'raster-fade-duration': 0,
      'raster-opacity': ['interpolate', ['linear'], ['zoom'], RELIEF_ZOOMS.maxzoom + 1, 1, RELIEF_END, 0],
    },
  };
}

function lineLayers(): LayerSpecification[] {
  return [
    {
      id: 'border',
      type: 'line',
      source: SOURCE,
      'source-layer': 'border',
      layout: { 'line-join': 'round' },
      paint: {
        'line-color': SHEET.border,
        'line-width': ['interpolate', ['linear'], ['zoom'], 1, 0.5, 4, 0.8, 8, 1.2],
        // Long dash, dot: lengths count in line widths.
        'line-dasharray': [8, 3, 1.4, 3],
      },
    },
    {
      id: 'coast',
      type: 'line',
      source: SOURCE,
      'source-layer': 'coast',
      layout: { 'line-join': 'round' },
      paint: { 'line-color': SHEET.coast, 'line-width': ['interpolate', ['linear'], ['zoom'], 1, 0.5, 4, 0.9, 8, 1.3] },
    },
  ];
}

function waterNames(face: string): LayerSpecification {
  const ocean = (large: number, small: number): ['case', ['==', ['get', 'kind'], 'ocean'], number, number] => [
    'case',
    ['==', ['get', 'kind'], 'ocean'],
    large,
    small,
  ];
  return {
    id: BELOW_NAMES,
    type: 'symbol',
    source: SOURCE,
    'source-layer': 'water',
    layout: {
      'text-field': ['get', 'name'],
      'text-font': [face],
      'text-size': ['interpolate', ['linear'], ['zoom'], 2, ocean(14, 12), 5, ocean(17, 14), 8, ocean(20, 17)],
      'text-letter-spacing': 0.06,
      'text-max-width': 7,
      'text-line-height': 1.15,
      'text-padding': 6,
    },
    paint: { 'text-color': SHEET.waterName },
  };
}

function landNames(face: string): LayerSpecification[] {
  return [
    {
      id: 'place-name',
      type: 'symbol',
      source: SOURCE,
      'source-layer': 'place',
      filter: ['<=', ['get', 'rank'], ['zoom']],
      layout: {
        // One symbol: a dot whose name finds no room is left out with it.
        'icon-image': ['case', ['has', 'capital'], CAPITAL_DOT, TOWN_DOT],
        'text-field': ['get', 'name'],
        'text-font': [face],
        'text-size': ['interpolate', ['linear'], ['get', 'rank'], 3, 13, 6, 12, 8, 11],
        'symbol-sort-key': ['-', ['get', 'population']],
        'text-variable-anchor': ['left', 'right', 'top', 'bottom'],
        'text-radial-offset': 0.4,
        'text-justify': 'auto',
        'text-max-width': 8,
        'text-line-height': 1.1,
        'text-padding': 5,
      },
      paint: { 'text-color': SHEET.placeName, 'text-halo-color': SHEET.halo, 'text-halo-width': 1.2 },
    },
    {
      id: 'country-name',
      type: 'symbol',
      source: SOURCE,
      'source-layer': 'country',
      filter: ['<=', ['get', 'rank'], ['zoom']],
      layout: {
        'text-field': ['get', 'name'],
        'text-font': [face],
        'text-size': ['interpolate', ['linear'], ['zoom'], 1, 11.5, 4, 14, 7, 17],
        'symbol-sort-key': ['get', 'rank'],
        'text-letter-spacing': 0.16,
        'text-max-width': 8,
        'text-line-height': 1.2,
        'text-padding': 6,
      },
      paint: { 'text-color': SHEET.countryName, 'text-halo-color': SHEET.halo, 'text-halo-width': 1.4 },
    },
  ];
}
