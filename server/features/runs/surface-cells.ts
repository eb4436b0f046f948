/** The cells of a surface: those of an H3 grid on land that a station supports, with a rim of empty ones around them. */
import * as h3 from 'h3-js';
import { kmOfSquaredChord, unitVectors } from '#engine/interpolation/sphere-vectors.ts';
import { PALE_SUPPORT, type SupportClass, supportClass } from '#engine/interpolation/support-class.ts';
import type { Relief } from '#engine/weather-files/relief.ts';
import type { SurfaceStation } from '../../jobs/web-task.ts';

export interface SurfaceCells {
  readonly resolution: number;
  /** Between the middles of neighbouring cells, on average. */
  readonly spacingKm: number;
  /** In the order of their H3 indexes, so that the children of a parent stand together. */
  readonly ids: readonly string[];
  readonly latitudes: Float64Array;
  readonly longitudes: Float64Array;
  readonly elevationsM: Float32Array;
  /** SUPPORT_CODES by cell; 0 on the rim. */
  readonly support: Uint8Array;
  /** Station whose cell it is, the nearest to its middle of several; -1 for the others. */
  readonly held: Int32Array;
}

export const SUPPORT_CODES: Readonly<Record<SupportClass, number>> = { none: 0, pale: 1, full: 2 };

/** Finer cells than the relief has nodes would pretend to know more. */
const FINEST = 6;
const COARSEST = 3;
/** About as many cells as a page draws anew within the blink of a slider; more would say little more between the same stations. */
const MOST_CELLS = 40_000;
/** The smallest cells are so much narrower than the average. */
const NARROWEST = 0.75;
/** A middle this part of the spacing off the coast still has land in its cell. */
const OFF_COAST = 0.35;

/** @param stations at least one */
export function surfaceCells(stations: readonly SurfaceStation[], relief: Relief): SurfaceCells {
  const resolution = chooseResolution(stations);
  const spacingKm = spacingOf(resolution);
  const support = supportByCell({ stations, resolution, relief, spacingKm });
  const holders = holdersByCell(stations, resolution);
  for (const cell of holders.keys()) support.set(cell, SUPPORT_CODES.full);
  const rim = new Set<string>();
  for (const cell of support.keys()) for (const near of h3.gridDisk(cell, 1)) if (!support.has(near)) rim.add(near);
  const ids = [...support.keys(), ...rim].sort();
  const centres = ids.map((id) => h3.cellToLatLng(id));
  return {
    resolution,
    spacingKm,
    ids,
    latitudes: Float64Array.from(centres, ([latitude]) => latitude),
    longitudes: Float64Array.from(centres, ([, longitude]) => longitude),
    elevationsM: Float32Array.from(centres, ([latitude, longitude]) => relief.heightM(latitude, longitude)),
    support: Uint8Array.from(ids, (id) => support.get(id) ?? 0),
    held: Int32Array.from(ids, (id) => holders.get(id) ?? -1),
  };
}

function spacingOf(resolution: number): number {
  return Math.sqrt((h3.getHexagonAreaAvg(resolution, 'km2') * 2) / Math.sqrt(3));
}

/** The finest grid that stays within what is quick, judged by the cells of a coarse one that stations reach. */
function chooseResolution(stations: readonly SurfaceStation[]): number {
  const coarse = 4;
  const reached = new Set<string>();
  for (const { latitude, longitude } of stations) {
    for (const cell of h3.gridDisk(h3.latLngToCell(latitude, longitude, coarse), ringsOf(coarse))) {
      if (reached.has(cell)) continue;
      const [cellLatitude, cellLongitude] = h3.cellToLatLng(cell);
      const km = h3.greatCircleDistance([latitude, longitude], [cellLatitude, cellLongitude], 'km');
      if (km <= PALE_SUPPORT.km) reached.add(cell);
    }
  }
  for (let resolution = FINEST; resolution > COARSEST; resolution--) {
    if (reached.size * 7 ** (resolution - coarse) <= MOST_CELLS) return resolution;
  }
  return COARSEST;
}

function ringsOf(resolution: number): number {
  return Math.ceil(PALE_SUPPORT.km / (NARROWEST * spacingOf(resolution)));
}

interface Ground {
  readonly vector: Float64Array;
  readonly elevationM: number;
}

/** The best that any station lends each cell on land; cells that none supports are left out. */
function supportByCell(on: {
  stations: readonly SurfaceStation[];
  resolution: number;
  relief: Relief;
  spacingKm: number;
}): Map<string, number> {
  const { stations, resolution, relief, spacingKm } = on;
  const support = new Map<string, number>();
  /** null: at sea. */
  const grounds = new Map<string, Ground | null>();
  const groundOf = (cell: string): Ground | null => {
    const known = grounds.get(cell);
    if (known !== undefined) return known;
    const [latitude, longitude] = h3.cellToLatLng(cell);
    const isLand = relief.kmFromLand(latitude, longitude) <= OFF_COAST * spacingKm;
    const vector = unitVectors({ latitudes: [latitude], longitudes: [longitude] });
    const ground = isLand ? { vector, elevationM: relief.heightM(latitude, longitude) } : null;
    grounds.set(cell, ground);
    return ground;
  };
  const rings = ringsOf(resolution);
  for (const { latitude, longitude, elevationM } of stations) {
    const from = unitVectors({ latitudes: [latitude], longitudes: [longitude] });
    for (const cell of h3.gridDisk(h3.latLngToCell(latitude, longitude, resolution), rings)) {
      const best = support.get(cell) ?? 0;
      if (best === SUPPORT_CODES.full) continue;
      const ground = groundOf(cell);
      if (ground === null) continue;
      const code = SUPPORT_CODES[supportClass(kmBetween(from, ground.vector), elevationM - ground.elevationM)];
      if (code > best) support.set(cell, code);
    }
  }
  return support;
}

function kmBetween(one: Float64Array, other: Float64Array): number {
  const x = (one[0] ?? 0) - (other[0] ?? 0);
  const y = (one[1] ?? 0) - (other[1] ?? 0);
  const z = (one[2] ?? 0) - (other[2] ?? 0);
  return kmOfSquaredChord(x * x + y * y + z * z);
}

/** Which station a cell shows that holds several: the nearest to its middle, of equals the first (method 9). */
function holdersByCell(stations: readonly SurfaceStation[], resolution: number): Map<string, number> {
  const nearest = new Map<string, { station: number; km: number }>();
  for (const [station, { latitude, longitude }] of stations.entries()) {
    const cell = h3.latLngToCell(latitude, longitude, resolution);
    const km = h3.greatCircleDistance(h3.cellToLatLng(cell), [latitude, longitude], 'km');
    const held = nearest.get(cell);
    if (held === undefined || km < held.km) nearest.set(cell, { station, km });
  }
  return new Map([...nearest].map(([cell, { station }]) => [cell, station]));
}
