import { knownZone } from './known-zone.ts';

/**
 * IANA zone of a station. At sea and where the look-up knows no zone it is the fixed offset of the file, as Etc/GMT±h;
 * places say so. (The signs of Etc zones are those of POSIX: Etc/GMT-5 is five hours ahead.)
 */
export function zoneOfStation(station: { latitude: number; longitude: number; utcOffsetH: number }): string {
  const zone = knownZone(station.latitude, station.longitude);
  if (zone !== null) return zone;
  const hours = Math.min(14, Math.max(-12, Math.round(station.utcOffsetH)));
  if (hours === 0) return 'Etc/GMT';
  return hours > 0 ? `Etc/GMT-${hours}` : `Etc/GMT+${-hours}`;
}
