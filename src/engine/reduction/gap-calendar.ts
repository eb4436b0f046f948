import { HOURS_PER_DAY } from '../conventions.ts';
import { dryBulbProvenance, hasRepair, humidityProvenance, pressureProvenance } from './hour-flags.ts';

/**
 * What the hours of each day are, 1 January first. An hour is `missing` without dry bulb, humidity or pressure; else `repaired` when
 * one of them is; else `estimated` when dry bulb or humidity is; else measured.
 */
export interface GapCalendar {
  readonly missing: readonly number[];
  readonly repaired: readonly number[];
  readonly estimated: readonly number[];
}

/** The gap calendar of a year's hours. @param flags provenance of each hour, see `hour-flags.ts` */
export function gapCalendar(flags: Uint8Array): GapCalendar {
  const days = Math.ceil(flags.length / HOURS_PER_DAY);
  const counts = { missing: new Uint8Array(days), repaired: new Uint8Array(days), estimated: new Uint8Array(days) };
  for (let slot = 0; slot < flags.length; slot++) {
    // As in nearly every hour, all three are measured, whose code is 0.
    if (flags[slot] === 0) continue;
    const kind = kindOf(flags[slot] ?? 0);
    if (kind === null) continue;
    const day = Math.floor(slot / HOURS_PER_DAY);
    counts[kind][day] = (counts[kind][day] ?? 0) + 1;
  }
  return { missing: [...counts.missing], repaired: [...counts.repaired], estimated: [...counts.estimated] };
}

function kindOf(flags: number): keyof GapCalendar | null {
  const dryBulb = dryBulbProvenance(flags);
  const humidity = humidityProvenance(flags);
  if (dryBulb === 'missing' || humidity === 'missing' || pressureProvenance(flags) === 'missing') return 'missing';
  if (hasRepair(flags)) return 'repaired';
  return dryBulb === 'estimated' || humidity === 'estimated' ? 'estimated' : null;
}
