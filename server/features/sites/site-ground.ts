import type { Relief } from '#engine/weather-files/relief.ts';

/** What the relief says of a position. */
export interface SiteGround {
  readonly reliefM: number | null;
  readonly kmFromLand: number;
}

export function groundAt(relief: Relief, { latitude, longitude }: { latitude: number; longitude: number }): SiteGround {
  const heightM = relief.heightM(latitude, longitude);
  const km = relief.kmFromLand(latitude, longitude);
  return { reliefM: Number.isFinite(heightM) ? Math.round(heightM) : null, kmFromLand: Number.isFinite(km) ? km : 0 };
}

/** A given height, or else that of the relief, which is marked as such. */
export function elevationOf(
  givenM: number | null,
  ground: SiteGround,
  source: 'person' | 'file',
): { elevationM: number | null; elevationSource: 'person' | 'file' | 'relief' | null } {
  if (givenM !== null) return { elevationM: givenM, elevationSource: source };
  return { elevationM: ground.reliefM, elevationSource: ground.reliefM === null ? null : 'relief' };
}
