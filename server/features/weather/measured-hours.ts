import { dryBulbProvenance, humidityProvenance } from '#engine/reduction/hour-flags.ts';

/** Hours whose dry bulb and humidity are both as the source measured them: what a grade calls the measured share. */
export function measuredHours(flags: Uint8Array): number {
  let measured = 0;
  for (const hour of flags) {
    // As in nearly every hour, all three are measured, whose code is 0.
    const counts = hour === 0 || (dryBulbProvenance(hour) === 'measured' && humidityProvenance(hour) === 'measured');
    if (counts) measured++;
  }
  return measured;
}
