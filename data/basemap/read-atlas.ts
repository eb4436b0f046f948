import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { feature, mesh } from 'topojson-client';
import { unwrappedLines, unwrappedPolygon } from './unwrap-rings.ts';

/** The three grains in which Natural Earth draws the world; the number is the scale in millions. */
export type Grain = '110m' | '50m' | '10m';

export type Position = readonly [longitude: number, latitude: number];
export type Ring = readonly Position[];
/** Outer ring first, holes after it. */
export type PolygonRings = readonly Ring[];

export type Country = { readonly name: string; readonly polygons: readonly PolygonRings[] };

export type Atlas = {
  readonly land: readonly PolygonRings[];
  readonly coast: readonly Ring[];
  readonly border: readonly Ring[];
  readonly countries: readonly Country[];
};

type Topology = Parameters<typeof mesh>[0];
type Shape = NonNullable<Parameters<typeof mesh>[1]>;
type AtlasFile = Topology & {
  readonly objects: { readonly land: Shape; readonly countries: Extract<Shape, { type: 'GeometryCollection' }> };
};

const require = createRequire(import.meta.url);

/** Natural Earth's land, coast, borders and countries of one grain, from the npm package world-atlas. */
export function readAtlas(grain: Grain): Atlas {
  const path = require.resolve(`world-atlas/countries-${grain}.json`);
  // The package's own JSON: the one place where it is given its type.
  const topology = JSON.parse(readFileSync(path, 'utf8')) as AtlasFile;
  const { land, countries } = topology.objects;
  const lines = (keep: (a: unknown, b: unknown) => boolean) =>
    unwrappedLines(mesh(topology, countries, keep).coordinates.map((line) => line.map(toPosition)));
  return {
    land: polygonsOf(feature(topology, land)),
    coast: lines((a, b) => a === b),
    border: lines((a, b) => a !== b),
    countries: countries.geometries.map((geometry) => ({
      name: nameOf(geometry.properties),
      polygons: polygonsOf(feature(topology, geometry)),
    })),
  };
}

function nameOf(properties: unknown): string {
  if (typeof properties === 'object' && properties !== null && 'name' in properties) return String(properties.name);
  throw new Error('world-atlas: a country has no name');
}

function polygonsOf(shape: GeoJSON.Feature | GeoJSON.FeatureCollection): PolygonRings[] {
  const features = shape.type === 'FeatureCollection' ? shape.features : [shape];
  return features.flatMap(({ geometry }) => {
    if (geometry?.type === 'Polygon') return [toPolygon(geometry.coordinates)];
    return geometry?.type === 'MultiPolygon' ? geometry.coordinates.map(toPolygon) : [];
  });
}

function toPolygon(rings: readonly number[][][]): PolygonRings {
  return unwrappedPolygon(rings.map((ring) => ring.map(toPosition)));
}

function toPosition(coordinates: readonly number[]): Position {
  const [longitude, latitude] = coordinates;
  if (longitude === undefined || latitude === undefined) throw new Error('world-atlas: a position lacks a coordinate');
  return [longitude, latitude];
}
