import type { FindingList } from '../finding-list.ts';
import type { ReadOptions, StatedPlace } from '../read-options.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';

const UNNAMED = 'Unnamed station';

/** A station of which the file says nothing. */
export function unknownStation(name = UNNAMED): DeclaredStation {
  return { name, latitude: null, longitude: null, elevationM: null, utcOffsetH: null, wmoNumber: null };
}

/** What a person has said goes before what the file says. */
export function withStatedPlace(station: DeclaredStation, place: StatedPlace = {}): DeclaredStation {
  const latitude = place.latitude ?? station.latitude;
  const longitude = place.longitude ?? station.longitude;
  const placed = latitude === null || longitude === null ? UNNAMED : placeName(latitude, longitude);
  return {
    name: place.name ?? (station.name === UNNAMED ? placed : station.name),
    latitude,
    longitude,
    elevationM: place.elevationM ?? station.elevationM,
    utcOffsetH: place.utcOffsetH ?? station.utcOffsetH,
    wmoNumber: station.wmoNumber,
  };
}

/** A place without a name is called after its position: "45.00 N, 8.00 E". */
export function placeName(latitude: number, longitude: number): string {
  const ns = `${Math.abs(latitude).toFixed(2)} ${latitude < 0 ? 'S' : 'N'}`;
  return `${ns}, ${Math.abs(longitude).toFixed(2)} ${longitude < 0 ? 'W' : 'E'}`;
}

/**
 * The place of a file that names no zone: what is stated goes first, then the standard offset of the zone at the position, which
 * is noted. Without either the offset stays null, and the file is asked about it.
 * @param by.inUtc whether the hours of the file are moved by that offset
 */
export function settlePlace(
  station: DeclaredStation,
  by: { readonly options: ReadOptions; readonly inUtc: boolean },
  findings: FindingList,
): DeclaredStation {
  const { inUtc, options } = by;
  const stated = withStatedPlace(station, options.place);
  const { latitude, longitude } = stated;
  if (stated.utcOffsetH !== null || latitude === null || longitude === null) return stated;
  if (Math.abs(latitude) > 90 || Math.abs(longitude) > 180) return stated;
  const found = options.zoneAt?.(latitude, longitude) ?? null;
  if (found === null) return stated;
  findings.add({
    code: 'place-zone',
    severity: 'note',
    message: () =>
      `The file names no time zone. Its position lies in ${found.zone}, so ${inUtc ? 'its hours in UTC are laid on' : 'its hours are taken to be in'} the standard time of that zone, UTC${signed(found.utcOffsetH)}. Say so if another is right.`,
  });
  return { ...stated, utcOffsetH: found.utcOffsetH };
}

function signed(hours: number): string {
  return hours < 0 ? `−${-hours}` : `+${hours}`;
}
