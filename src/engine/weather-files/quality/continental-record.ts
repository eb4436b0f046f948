import { MISSING_INT16 } from '../../conventions.ts';
import type { FindingList } from '../finding-list.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, type TestedHours } from './tested-hours.ts';

/** Records of dry bulb, °C, by region of the World Meteorological Organization: the limits of HadISD's records test. */
const RECORDS_C = {
  Africa: { low: -23.9, high: 55.0 },
  Antarctica: { low: -89.2, high: 15.0 },
  Asia: { low: -67.8, high: 53.9 },
  Europe: { low: -58.1, high: 48.0 },
  'North America': { low: -63.0, high: 56.7 },
  Oceania: { low: -23.0, high: 50.7 },
  'South America': { low: -32.8, high: 48.9 },
} as const;
type Region = keyof typeof RECORDS_C;

/** Where the place is not known, or on the edge of two regions. */
const ELSEWHERE_C = { low: -60, high: 54 } as const;

/**
 * Boxes well inside each region, ours: south, north, west, east. Between them nobody is accused of passing a record that may be
 * that of the neighbour.
 */
const BOXES: readonly (readonly [Region, number, number, number, number])[] = [
  ['Antarctica', -90, -60, -180, 180],
  ['Oceania', -50, -11, 110, 180],
  ['Oceania', -50, 0, -180, -120],
  ['South America', -57, 7, -82, -34],
  ['North America', 14, 84, -170, -52],
  ['Africa', -36, 29, -19, 33],
  ['Africa', -36, 10, 33, 52],
  ['Europe', 44, 72, -25, 40],
  ['Europe', 37, 44, -10, 26],
  ['Asia', 10, 80, 60, 180],
];

/** Limits of the dry bulb at a place, °C, and whose record they are; null stands for the whole Earth but its poles. */
export function recordLimits(place: Pick<DeclaredStation, 'latitude' | 'longitude'>): {
  readonly region: Region | null;
  readonly low: number;
  readonly high: number;
} {
  const latitude = place.latitude ?? Number.NaN;
  const longitude = place.longitude ?? Number.NaN;
  for (const [region, south, north, west, east] of BOXES) {
    const inside = latitude >= south && latitude <= north && longitude >= west && longitude <= east;
    if (inside) return { region, ...RECORDS_C[region] };
  }
  return { region: null, ...ELSEWHERE_C };
}

/** Tells a dry bulb beyond the record of its part of the world; it is used as it stands. */
export function continentalRecord(hours: TestedHours, station: DeclaredStation, findings: FindingList): void {
  const { region, ...limits } = recordLimits(station);
  const low = Math.round(100 * limits.low);
  const high = Math.round(100 * limits.high);
  const { bounds, values } = hours.dryBulb;
  if (bounds.least >= low && bounds.most <= high) return;
  const isBeyond = (value: number) => value > high || (value < low && value !== MISSING_INT16);
  for (let step = 0; step < values.length; step++) {
    const value = values[step] ?? MISSING_INT16;
    if ((value <= high && value >= low) || value === MISSING_INT16) continue;
    const start = step;
    let worst = value;
    for (; step < values.length && isBeyond(values[step] ?? 0); step++) {
      if (Math.abs(values[step] ?? 0) > Math.abs(worst)) worst = values[step] ?? 0;
    }
    tellSpan(
      hours,
      {
        start,
        end: step,
        code: 'range',
        severity: 'doubt',
        variable: 'dry bulb',
        done: 'kept',
        sentence: () =>
          `a dry bulb of ${degrees(worst)} °C lies outside the record of ${region ?? 'the inhabited Earth'}, ${limits.low} to ${limits.high} °C. It is used as it stands.`,
      },
      findings,
    );
  }
}
