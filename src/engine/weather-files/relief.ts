/** A place further from land than this stands in the sea; buoys, platforms, small islands and rounded positions lie nearer. */
export const AT_SEA_FROM_KM = 20;

/** Distances from land, km, are told up to here. */
export const FARTHEST_TOLD_KM = 40;

/** What is known of the ground at any place on Earth, approximately. Handed in, since the engine opens no files. */
export interface Relief {
  /** Height of the ground, m above sea level; 0 at sea. Degrees, north and east positive. */
  heightM(latitude: number, longitude: number): number;
  /** Distance from the nearest land, km, `FARTHEST_TOLD_KM` for anything further; 0 on land. */
  kmFromLand(latitude: number, longitude: number): number;
}
