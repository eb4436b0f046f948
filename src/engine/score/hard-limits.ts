import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import { deratedC } from '../hour-classes/derating.ts';
import type { HourColumns } from '../run/hour-columns.ts';

/** A hard limit with the hours found over it. */
export interface HardLimitCount {
  /** °C, after derating. */
  readonly tempC: number;
  readonly derated: boolean;
  readonly allowedHours: number;
  readonly foundHours: number;
}

/**
 * Unmet demand hours with t_set + S over each hard limit, S from the lowest supply without caps (method 3.1).
 * @param input.heightM the height used for the place, m
 */
export function countHardLimits(input: {
  brief: Pick<Brief, 'hardLimits'>;
  heightM: number;
  hours: Pick<HourColumns, 'count' | 'met' | 'setC' | 'uncappedShortfallK'>;
}): HardLimitCount[] {
  return input.brief.hardLimits.map((limit) => {
    const tempC = deratedC(limit, input.heightM);
    const foundHours = countOver(input.hours, hundredths(tempC));
    return { tempC, derated: tempC !== limit.tempC, allowedHours: limit.hours, foundHours };
  });
}

function countOver(hours: Parameters<typeof countHardLimits>[0]['hours'], limitHundredths: number): number {
  let over = 0;
  for (let at = 0; at < hours.count; at++) {
    if (hours.met[at] === 1) continue;
    if (hundredths((hours.setC[at] ?? Number.NaN) + (hours.uncappedShortfallK[at] ?? 0)) > limitHundredths) over++;
  }
  return over;
}
