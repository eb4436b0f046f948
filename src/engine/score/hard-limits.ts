import type { Brief, HardLimit } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import type { DemandHour, HourJudgement } from '../hour-classes/demand-hour.ts';

/** A hard limit with the hours found over it. */
export interface HardLimitCount {
  /** °C, after derating. */
  readonly tempC: number;
  readonly derated: boolean;
  readonly allowedHours: number;
  readonly foundHours: number;
}

/** Thermal guidelines for data halls lower their limits by 1 K per 300 m above 900 m (method 3.1, after practice P4, P5). */
const DERATE_FROM_M = 900;
const DERATE_M_PER_K = 300;

/** Kelvin that a derated limit is lowered at a height, m; continuous. */
export function deratingK(heightM: number): number {
  return Math.max(0, heightM - DERATE_FROM_M) / DERATE_M_PER_K;
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
    const tempC = hardLimitC(limit, input.heightM);
    const over = input.demandHours.filter(
      ({ hour, judgement }) =>
        !judgement.met && hundredths(hour.setC + judgement.uncappedShortfallK) > hundredths(tempC),
    );
    return { tempC, derated: tempC !== limit.tempC, allowedHours: limit.hours, foundHours: over.length };
  });
}

function hardLimitC(limit: HardLimit, heightM: number): number {
  return limit.derate === undefined ? limit.tempC : limit.tempC - deratingK(heightM);
}
