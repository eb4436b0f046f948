import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';
import { deratedC } from '../hour-classes/derating.ts';

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
  demandHours: readonly { hour: DemandHour; judgement: HourJudgement }[];
}): HardLimitCount[] {
  return input.brief.hardLimits.map((limit) => {
    const tempC = deratedC(limit, input.heightM);
    const over = input.demandHours.filter(
      ({ hour, judgement }) =>
        !judgement.met && hundredths(hour.setC + judgement.uncappedShortfallK) > hundredths(tempC),
    );
    return { tempC, derated: tempC !== limit.tempC, allowedHours: limit.hours, foundHours: over.length };
  });
}
