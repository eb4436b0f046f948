/** Which station stands for a site unless a person chooses another with a reason (method 8). */
import { greatCircleKm, type Position } from './great-circle-km.ts';

export interface StationToChoose extends Position {
  readonly id: string;
  readonly elevationM: number;
}

/** A place that looks for its station. */
export type SiteToServe = Position & { readonly elevationM: number | null };

export interface StationChoice {
  readonly id: string;
  readonly distanceKm: number;
  /** Station less site, m; null while the site's height is not known, which then counts for nothing. */
  readonly heightDifferenceM: number | null;
  /** distance / 100 km + |height difference| / 300 m. */
  readonly figure: number;
}

export const KM_PER_FIGURE = 100;
export const M_PER_FIGURE = 300;

/**
 * Stations by what speaks against them, the default first; of equals, the lesser id, so that the order of a query chooses
 * nothing.
 * @param input.stations those with a usable year
 */
export function rankStations(input: {
  site: SiteToServe;
  stations: readonly StationToChoose[];
}): readonly StationChoice[] {
  const { site, stations } = input;
  return stations.map((station) => choiceOf(site, station)).sort((one, other) => (isBefore(one, other) ? -1 : 1));
}

/** How one station stands to a site. */
export function choiceOf(site: SiteToServe, station: StationToChoose): StationChoice {
  const distanceKm = greatCircleKm(site, station);
  const heightDifferenceM = site.elevationM === null ? null : station.elevationM - site.elevationM;
  const figure = distanceKm / KM_PER_FIGURE + Math.abs(heightDifferenceM ?? 0) / M_PER_FIGURE;
  return { id: station.id, distanceKm, heightDifferenceM, figure };
}

/** The order of the ranking: the least figure first; of equals, the lesser id. */
export function isBefore(one: StationChoice, other: StationChoice): boolean {
  return one.figure < other.figure || (one.figure === other.figure && one.id < other.id);
}
