/** What about a site and its station asks a person for a look. */
import { AT_SEA_FROM_KM } from '../weather-files/relief.ts';

export type SiteFlagName = 'far' | 'height' | 'no station' | 'station without years' | 'sea' | 'relief';

/** Beyond these the grade is D whatever else holds (method 7.7). */
const FAR_KM = 100;
const HEIGHT_M = 300;
/** The relief has a point every 9 km. */
const RELIEF_WITHIN_M = 300;

export interface SiteToFlag {
  readonly elevationM: number | null;
  readonly elevationSource: 'person' | 'file' | 'relief' | null;
  /** Height of the relief there, m. */
  readonly reliefM: number | null;
  readonly kmFromLand: number;
  /** Its station; null when there is none. */
  readonly station: {
    readonly distanceKm: number;
    readonly heightDifferenceM: number | null;
    readonly hasYears: boolean;
  } | null;
}

/**
 * far: over 100 km from its station; height: over 300 m between the two; sea: over 20 km from land; relief: a given height is over 300 m
 * from the relief, as swapped or mistyped coordinates make it.
 */
export function siteFlags(site: SiteToFlag): SiteFlagName[] {
  const { station, elevationM, elevationSource, reliefM } = site;
  const flags: SiteFlagName[] = [];
  if (station === null) flags.push('no station');
  else {
    if (station.distanceKm > FAR_KM) flags.push('far');
    if (Math.abs(station.heightDifferenceM ?? 0) > HEIGHT_M) flags.push('height');
    if (!station.hasYears) flags.push('station without years');
  }
  if (site.kmFromLand > AT_SEA_FROM_KM) flags.push('sea');
  const given = elevationM !== null && elevationSource !== 'relief';
  if (given && reliefM !== null && Math.abs(elevationM - reliefM) > RELIEF_WITHIN_M) flags.push('relief');
  return flags;
}
