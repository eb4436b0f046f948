import { dayLabel, hourLabel } from '../../charts/calendar.ts';
import { HOURS_PER_DAY } from '../../engine/conventions.ts';
import { relativeHumidityPct } from '../../engine/psychrometrics/moist-air.ts';
import {
  dryBulbProvenance,
  humidityProvenance,
  type Provenance,
  pressureProvenance,
} from '../../engine/reduction/hour-flags.ts';
import { differenceK, percent, temperatureC } from '../../lib/format.ts';
import type { RecordYear } from './record-year.ts';

/** "3 Jan, 13:00 to 14:00". */
export function slotWords(slot: number, slots: number): string {
  const day = Math.floor(slot / HOURS_PER_DAY);
  return `${dayLabel(day, slots / HOURS_PER_DAY)}, ${hourLabel((slot % HOURS_PER_DAY) + 1)}`;
}

/** One hour as it is read off the cloth: values, then where they come from. */
export function hourWords(year: RecordYear, slot: number): string {
  const flags = year.packed.flags[slot] ?? 0;
  const dryBulbC = year.dryBulbC[slot] ?? Number.NaN;
  const ratio = year.humidityRatio[slot] ?? Number.NaN;
  const pressurePa = year.pressurePa[slot] ?? Number.NaN;
  const depressionK = year.depressionK[slot] ?? Number.NaN;
  const values = Number.isNaN(depressionK)
    ? [Number.isNaN(dryBulbC) ? 'dry bulb not known' : `dry bulb ${temperatureC(dryBulbC)}`, 'wet bulb not known']
    : [
        `dry bulb ${temperatureC(dryBulbC)}`,
        `wet bulb ${temperatureC(year.wetBulbC[slot] ?? Number.NaN)}`,
        `depression ${differenceK(depressionK)}`,
        `relative humidity ${percent(Math.min(100, relativeHumidityPct(dryBulbC, ratio, pressurePa)), 0)}`,
      ];
  return `${slotWords(slot, year.depressionK.length)}: ${values.join(', ')}. ${provenanceWords(flags)}`;
}

/** "Measured." or "Humidity repaired by a rule, pressure estimated." */
export function provenanceWords(flags: number): string {
  const parts: readonly (readonly [string, Provenance])[] = [
    ['dry bulb', dryBulbProvenance(flags)],
    ['humidity', humidityProvenance(flags)],
    ['pressure', pressureProvenance(flags)],
  ];
  const other = parts.filter(([, provenance]) => provenance !== 'measured');
  if (other.length === 0) return 'Measured.';
  const words = other.map(
    ([what, provenance]) => `${what} ${provenance === 'repaired' ? 'repaired by a rule' : provenance}`,
  );
  const joined = words.join(', ');
  return `${joined.charAt(0).toUpperCase()}${joined.slice(1)}.`;
}
