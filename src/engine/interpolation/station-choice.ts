/** Which station stands for a site unless a person chooses another with a reason (method 8). */
import { greatCircleKm, type Position } from './great-circle-km.ts';

export interface StationToChoose extends Position {
  readonly id: string;
  readonly elevationM: number;
}

export interface StationChoice {
  readonly id: string;
  readonly distanceKm: number;
  /** Station less site, m; null while the site's height is not known, which then counts for nothing. */
  readonly heightDifferenceM: number | null;
  /** distance / 100 km + |height difference| / 300 m. */
  readonly figure: number;
}

const KM_PER_FIGURE = 100;
const M_PER_FIGURE = 300;

/**
 * Stations by what speaks against them, the default first; of equals, the lesser id, so that the order of a query chooses
 * nothing.
 * @param input.stations those with a usable year
 */
export function rankStations(input: {
  site: Position & { readonly elevationM: number | null };
  stations: readonly StationToChoose[];
}): readonly StationChoice[] {
  const { site, stations } = input;
  const choices = stations.map((station) => {
    const distanceKm = greatCircleKm(site, station);
    const heightDifferenceM = site.elevationM === null ? null : station.elevationM - site.elevationM;
    const figure = distanceKm / KM_PER_FIGURE + Math.abs(heightDifferenceM ?? 0) / M_PER_FIGURE;
    return { id: station.id, distanceKm, heightDifferenceM, figure };
  });
  return choices.sort((one, other) => one.figure - other.figure || (one.id < other.id ? -1 : 1));
}
