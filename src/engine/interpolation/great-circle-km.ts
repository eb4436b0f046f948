/** A place on the globe, degrees, north and east positive. */
export interface Position {
  readonly latitude: number;
  readonly longitude: number;
}

/** Mean radius of the Earth, km (IUGG: (2 a + b) / 3 of the GRS 80 ellipsoid). */
export const EARTH_RADIUS_KM = 6371.0088;
export const RADIANS_PER_DEGREE = Math.PI / 180;

/** Distance along the great circle, km, on a sphere of mean radius, by the haversine formula. */
export function greatCircleKm(from: Position, to: Position): number {
  const fromRad = from.latitude * RADIANS_PER_DEGREE;
  const toRad = to.latitude * RADIANS_PER_DEGREE;
  const halfLatitude = (toRad - fromRad) / 2;
  const halfLongitude = ((to.longitude - from.longitude) * RADIANS_PER_DEGREE) / 2;
  const haversine = Math.sin(halfLatitude) ** 2 + Math.cos(fromRad) * Math.cos(toRad) * Math.sin(halfLongitude) ** 2;
  // Rounding may pass 1 between two ends of a diameter.
  return 2 * EARTH_RADIUS_KM * Math.asin(Math.min(1, Math.sqrt(haversine)));
}
