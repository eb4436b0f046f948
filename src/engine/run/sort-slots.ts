import type { OpenSchedule } from '../clock/open-schedule.ts';
import { MISSING_INT16, MISSING_UINT16 } from '../conventions.ts';
import { hourClasses } from '../hour-classes/hour-class.ts';
import type { PackedYear } from '../reduction/weather-year.ts';
import type { HourColumns } from './hour-columns.ts';

const MISSING = hourClasses.indexOf('missing');
const IDLE = hourClasses.indexOf('idle');

/**
 * `closed`, `missing`, `idle`, in this order; the slots that are left have demand and are listed in the columns. On the packed
 * numbers, which are whole hundredths of °C.
 * @param idleHundredths slots at or under this have no demand
 * @returns one position in `hourClasses` for every slot, `closed` where there is demand
 */
export function sortSlots(
  { dryBulb, humidityRatio, pressure }: PackedYear,
  schedule: OpenSchedule,
  idleHundredths: number,
  into: HourColumns,
): Uint8Array {
  const classCodes = new Uint8Array(dryBulb.length);
  const { slots: openSlots } = schedule;
  const { slot: demandSlots } = into;
  let count = 0;
  for (let index = 0; index < openSlots.length; index++) {
    const slot = openSlots[index] ?? 0;
    const tempHundredths = dryBulb[slot] ?? MISSING_INT16;
    const unknown =
      tempHundredths === MISSING_INT16 || humidityRatio[slot] === MISSING_UINT16 || pressure[slot] === MISSING_UINT16;
    if (unknown) classCodes[slot] = MISSING;
    else if (tempHundredths <= idleHundredths) classCodes[slot] = IDLE;
    else demandSlots[count++] = slot;
  }
  into.count = count;
  return classCodes;
}
