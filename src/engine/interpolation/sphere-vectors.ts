import { EARTH_RADIUS_KM, type Position, RADIANS_PER_DEGREE } from './great-circle-km.ts';

/** Places in columns, degrees; as many of the one as of the other. */
export interface Positions {
  readonly latitudes: ArrayLike<number>;
  readonly longitudes: ArrayLike<number>;
}

export function columnsOf(places: readonly Position[]): Positions {
  return {
    latitudes: places.map(({ latitude }) => latitude),
    longitudes: places.map(({ longitude }) => longitude),
  };
}

/**
 * Places as points of the unit sphere, x, y, z in turn: among chords a triangle's inequality holds, near the poles and over the
 * date line too, and comparing two costs no trigonometry.
 */
export function unitVectors({ latitudes, longitudes }: Positions): Float64Array {
  const vectors = new Float64Array(3 * latitudes.length);
  for (let at = 0; at < latitudes.length; at++) {
    const latitude = (latitudes[at] ?? 0) * RADIANS_PER_DEGREE;
    const longitude = (longitudes[at] ?? 0) * RADIANS_PER_DEGREE;
    const fromAxis = Math.cos(latitude);
    vectors[3 * at] = fromAxis * Math.cos(longitude);
    vectors[3 * at + 1] = fromAxis * Math.sin(longitude);
    vectors[3 * at + 2] = Math.sin(latitude);
  }
  return vectors;
}

/** Kilometres along the great circle that a chord of the unit sphere spans, given its square. */
export function kmOfSquaredChord(squaredChord: number): number {
  return 2 * EARTH_RADIUS_KM * Math.asin(Math.min(1, Math.sqrt(squaredChord) / 2));
}
