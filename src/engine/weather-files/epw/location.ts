import type { DeclaredStation } from '../weather-file-reading.ts';
import { headerNumber } from './header-fields.ts';

const NO_NUMBER = /^(-*|unknown|n\/?a|0+|9{3,6})$/i;
const NO_NAME = /^(-*|unknown)$/i;
const LONGEST_NAME = 200;
/** What is taken for a number at all; whether it is a place is tested later. Elevations beyond these are codes or typing errors. */
const LIMITS = { latitude: 180, longitude: 360, lowestM: -500, highestM: 9_000, westH: -12, eastH: 14 } as const;

/** LOCATION: city, state, country, source, WMO number (text), latitude, longitude, time zone (h), elevation (m). */
export function readLocation(fields: readonly string[]): DeclaredStation {
  const latitude = within(headerNumber(fields[6]), -LIMITS.latitude, LIMITS.latitude);
  const longitude = within(headerNumber(fields[7]), -LIMITS.longitude, LIMITS.longitude);
  const wmo = fields[5] ?? '';
  return {
    name: stationName(fields[1] ?? '', latitude, longitude),
    latitude,
    longitude,
    elevationM: within(headerNumber(fields[9]), LIMITS.lowestM, LIMITS.highestM),
    utcOffsetH: within(headerNumber(fields[8]), LIMITS.westH, LIMITS.eastH),
    wmoNumber: NO_NUMBER.test(wmo) ? null : printable(wmo).slice(0, LONGEST_NAME),
  };
}

function within(value: number | null, low: number, high: number): number | null {
  return value !== null && value >= low && value <= high ? value : null;
}

function stationName(city: string, latitude: number | null, longitude: number | null): string {
  const name = printable(city).slice(0, LONGEST_NAME);
  if (!NO_NAME.test(name)) return name;
  if (latitude === null || longitude === null) return 'Unnamed station';
  const ns = `${Math.abs(latitude).toFixed(2)} ${latitude < 0 ? 'S' : 'N'}`;
  return `${ns}, ${Math.abs(longitude).toFixed(2)} ${longitude < 0 ? 'W' : 'E'}`;
}

function printable(text: string): string {
  return text.replace(/\p{C}/gu, '').replace(/\s+/g, ' ').trim();
}
