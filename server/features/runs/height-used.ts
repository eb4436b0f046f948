import { adjustToHeight, heightInSteps } from '#engine/climate/adjust-to-height.ts';
import type { PackedYear, WeatherYear } from '#engine/reduction/weather-year.ts';

export interface HeightUsed {
  /** What the hours are judged at, m: part of a run's key. */
  readonly heightM: number;
  /** The weather is moved to that height. */
  readonly adjusted: boolean;
}

/**
 * The height of a site's hours: its own in steps of 10 m where a file or a person gave it, else its station's (method 8). A height
 * of the relief moves nothing.
 */
export function heightUsed(
  site: { readonly elevationM: number | null; readonly elevationSource: 'person' | 'file' | 'relief' | null },
  stationElevationM: number,
): HeightUsed {
  const { elevationM, elevationSource } = site;
  if (elevationM === null || elevationSource === null || elevationSource === 'relief')
    return { heightM: stationElevationM, adjusted: false };
  const heightM = heightInSteps(elevationM);
  return { heightM, adjusted: heightM !== stationElevationM };
}

/** The weather that a run judged: as it was measured, or moved to its height. */
export function yearAtHeight(year: WeatherYear, height: JudgedHeight): WeatherYear {
  return { ...year, packed: packedAtHeight(year.packed, height) };
}

export interface JudgedHeight {
  readonly heightM: number;
  /** The height of the station; null: nothing is moved. */
  readonly adjustedFromM: number | null;
}

export function packedAtHeight(packed: PackedYear, { heightM, adjustedFromM }: JudgedHeight): PackedYear {
  return adjustedFromM === null
    ? packed
    : adjustToHeight({ year: { packed }, fromElevationM: adjustedFromM, toElevationM: heightM }).packed;
}
