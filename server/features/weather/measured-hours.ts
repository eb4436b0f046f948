import { dryBulbProvenance, humidityProvenance } from '#engine/reduction/hour-flags.ts';

/** Hours whose dry bulb and humidity are both as the source measured them: what a grade calls the measured share. */
export function measuredHours(flags: Uint8Array): number {
  return flags.filter((hour) => dryBulbProvenance(hour) === 'measured' && humidityProvenance(hour) === 'measured')
    .length;
}
