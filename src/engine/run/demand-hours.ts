/**
 * What every demand hour is before it is judged: outdoor air, what the room is held at, load and what the supply must reach.
 * Written into the columns for all hours at once, so that a use can run through them without an object or a call per hour.
 */
import type { Brief } from '../brief/brief.ts';
import { designDryBulbC, loadFractionAt, loadLine } from '../hour-classes/load-fraction.ts';
import { setPoints, steadySetC } from '../hour-classes/set-points.ts';
import { volumeM3PerKg } from '../psychrometrics/moist-air.ts';
import { unpackDryBulb, unpackSlots } from '../reduction/packed-columns.ts';
import type { WeatherYear } from '../reduction/weather-year.ts';
import type { HourColumns } from './hour-columns.ts';

/**
 * @param into columns whose `slot` and `count` say which hours have demand
 * @returns 1 for every slot whose adaptive limit was clamped to its range; null for other limits
 */
export function meetDemandHours(
  { year, brief, heightM }: { year: WeatherYear; brief: Brief; heightM: number },
  into: HourColumns,
): Uint8Array | null {
  const { packed } = year;
  unpackSlots(packed, into.slot, into.count, into);
  fillVolumes(into);
  const outsideRange = fillSetPoints({ year, brief, heightM }, into);
  const line = loadLine(brief, () => designDryBulbC(packed));
  if (line === null) into.loadFraction.fill(1, 0, into.count);
  else for (let at = 0; at < into.count; at++) into.loadFraction[at] = loadFractionAt(line, into.dryBulbC[at] ?? 0);
  for (let at = 0; at < into.count; at++) {
    into.supplyAimC[at] = (into.setC[at] ?? 0) - brief.dTroomK * (into.loadFraction[at] ?? 0);
  }
  return outsideRange;
}

function fillVolumes({ count, dryBulbC, humidityRatio, pressurePa, volumeM3PerKg: volumes }: HourColumns): void {
  for (let at = 0; at < count; at++) {
    volumes[at] = volumeM3PerKg(dryBulbC[at] ?? 0, humidityRatio[at] ?? 0, pressurePa[at] ?? 0);
  }
}

function fillSetPoints(
  { year, brief, heightM }: { year: WeatherYear; brief: Brief; heightM: number },
  { count, slot, setC }: HourColumns,
): Uint8Array | null {
  if (brief.limit.kind !== 'adaptive') {
    setC.fill(steadySetC(brief, heightM), 0, count);
    return null;
  }
  const wrapped = year.kind !== 'actual';
  const moving = setPoints({ brief, dryBulbC: unpackDryBulb(year.packed), wrapped, heightM });
  for (let at = 0; at < count; at++) setC[at] = moving.setC[slot[at] ?? 0] ?? Number.NaN;
  return moving.outsideRange;
}
