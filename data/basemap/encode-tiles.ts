import { GeoJSONVT } from '@maplibre/geojson-vt';
import { fromGeojsonVt } from '@maplibre/vt-pbf';
import { choosePlaces, type Place } from './choose-places.ts';
import { type CountryLabel, labelCountries } from './label-countries.ts';
import { type Atlas, type Grain, type PolygonRings, type Position, type Ring, readAtlas } from './read-atlas.ts';
import { SEAS } from './seas.ts';

export const MAX_ZOOM = 7;

/** The bytes of one vector tile, not compressed; null where there is nothing to draw. */
export type EncodeTile = (z: number, x: number, y: number) => Uint8Array | null;

const EXTENT = 4096;
/** How far shapes reach beyond their tile, so that their outlines do not show at its edge. */
const SHAPE_BUFFER = 64;
const LABEL_BUFFER = 8;

/** The function that cuts tiles. Sources are read and indexed as zooms ask for them (all: about 3 s and 0.8 GB). */
export function tileEncoder(): EncodeTile {
  const shapes = remembered((grain: Grain) => shapeLayers(readAtlas(grain)));
  const names = remembered((_: 'names') => ({
    countries: labelCountries(readAtlas('50m').countries),
    places: choosePlaces(),
  }));
  const labels = remembered((zoom: number) => labelLayers(zoom, names('names')));
  return (z, x, y) => {
    const layers: Parameters<typeof fromGeojsonVt>[0] = {};
    for (const [name, index] of [...shapes(grainAt(z)), ...labels(z)]) {
      const tile = index.getTile(z, x, y);
      if (tile !== null && tile.features.length > 0) layers[name] = tile;
    }
    return Object.keys(layers).length === 0 ? null : fromGeojsonVt(layers, { version: 2, extent: EXTENT });
  };
}

function remembered<Key, Value>(make: (key: Key) => Value): (key: Key) => Value {
  const made = new Map<Key, Value>();
  return (key) => {
    const known = made.get(key);
    if (known !== undefined) return known;
    const value = make(key);
    made.set(key, value);
    return value;
  };
}

function grainAt(zoom: number): Grain {
  if (zoom < 2) return '110m';
  return zoom < 5 ? '50m' : '10m';
}

type NamedIndex = readonly [layer: string, index: GeoJSONVT];

function shapeLayers(atlas: Atlas): NamedIndex[] {
  return [
    ['land', indexed([feature({ type: 'MultiPolygon', coordinates: mutablePolygons(atlas.land) }, {})], SHAPE_BUFFER)],
    ['coast', indexed([feature({ type: 'MultiLineString', coordinates: mutable(atlas.coast) }, {})], SHAPE_BUFFER)],
    ['border', indexed([feature({ type: 'MultiLineString', coordinates: mutable(atlas.border) }, {})], SHAPE_BUFFER)],
  ];
}

type Names = { readonly countries: readonly CountryLabel[]; readonly places: readonly Place[] };

/**
 * The label layers of one zoom. A tile holds what its zoom may show, and no more; the tiles of the largest zoom also
 * hold the towns of the zooms beyond it, which the client cuts from the same tiles.
 */
function labelLayers(zoom: number, { countries, places }: Names): NamedIndex[] {
  const shown = (rank: number) => rank <= zoom || zoom === MAX_ZOOM;
  const water = SEAS.filter((sea) => sea.rank <= zoom && zoom <= sea.until).map((sea) =>
    pointFeature(sea.position, { name: sea.name, kind: sea.kind }),
  );
  const country = countries
    .filter((label) => shown(label.rank))
    .map((label) => pointFeature(label.position, { name: label.name, rank: label.rank }));
  const place = places
    .filter(({ rank }) => shown(rank))
    .map(({ name, rank, population, capital, position }) =>
      pointFeature(position, { name, rank, population, ...(capital ? { capital: 1 } : {}) }),
    );
  return [
    ['water', indexed(water, LABEL_BUFFER)],
    ['country', indexed(country, LABEL_BUFFER)],
    ['place', indexed(place, LABEL_BUFFER)],
  ];
}

function indexed(features: GeoJSON.Feature[], buffer: number): GeoJSONVT {
  return new GeoJSONVT(
    { type: 'FeatureCollection', features },
    { maxZoom: MAX_ZOOM, indexMaxZoom: 4, tolerance: 3, extent: EXTENT, buffer },
  );
}

function feature(geometry: GeoJSON.Geometry, properties: GeoJSON.GeoJsonProperties): GeoJSON.Feature {
  return { type: 'Feature', geometry, properties };
}

function pointFeature(position: Position, properties: GeoJSON.GeoJsonProperties): GeoJSON.Feature {
  return feature({ type: 'Point', coordinates: [...position] }, properties);
}

function mutable(lines: readonly Ring[]): number[][][] {
  return lines.map((line) => line.map((position) => [...position]));
}

function mutablePolygons(polygons: readonly PolygonRings[]): number[][][][] {
  return polygons.map(mutable);
}
