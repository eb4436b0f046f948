import { MISSING_INT16, MISSING_UINT16 } from '../conventions.ts';
import type { PackedYear } from '../reduction/weather-year.ts';

const found = new WeakMap<PackedYear, Uint16Array>();

/** Slots whose dry bulb, humidity or pressure is not known, in order; kept beside the year while that is in memory. */
export function missingSlots(year: PackedYear): Uint16Array {
  const slots = found.get(year) ?? findMissing(year);
  found.set(year, slots);
  return slots;
}

function findMissing({ dryBulb, humidityRatio, pressure }: PackedYear): Uint16Array {
  const slots = new Uint16Array(dryBulb.length);
  let count = 0;
  for (let slot = 0; slot < dryBulb.length; slot++) {
    const known =
      dryBulb[slot] !== MISSING_INT16 && humidityRatio[slot] !== MISSING_UINT16 && pressure[slot] !== MISSING_UINT16;
    if (!known) slots[count++] = slot;
  }
  return slots.slice(0, count);
}
