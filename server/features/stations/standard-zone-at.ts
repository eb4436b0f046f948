import { zoneOffset } from '#engine/clock/zone-offset.ts';
import type { StationZone } from '#engine/weather-files/read-options.ts';
import { knownZone } from './known-zone.ts';

/** Winter and summer of one year; the smaller offset is that of standard time in either hemisphere. */
const MOMENTS_MS = [Date.UTC(2024, 0, 1), Date.UTC(2024, 6, 1)] as const;
const MINUTES_PER_HOUR = 60;

/** The zone of a position with its standard offset, for files in UTC that name none. */
export function standardZoneAt(latitude: number, longitude: number): StationZone | null {
  const zone = knownZone(latitude, longitude);
  if (zone === null) return null;
  const offsetMin = Math.min(...MOMENTS_MS.map(zoneOffset(zone)));
  return { zone, utcOffsetH: offsetMin / MINUTES_PER_HOUR };
}
