/**
 * Where the demand hours of a year are worked out, one column per figure, by place in `HourColumns`: used for one block of hours
 * after another, and nothing of it is part of a result.
 */
import { SLOTS_PER_LEAP_YEAR } from '../../conventions.ts';

/** Some hours by their places, in order. */
export interface HourList {
  readonly places: Uint16Array;
  count: number;
}

export interface RoomHours {
  /** Hours that outdoor air does not meet; of them those in which a stage may; and those that none does. */
  readonly unmetByAir: HourList;
  readonly wet: HourList;
  readonly unmet: HourList;
  /** 1 where the wet stages may run. */
  readonly mayWet: Uint8Array;
  /** Supplies with less moisture than this keep the caps where they are no colder than they need be, kg/kg. */
  readonly ratioUnderCaps: Float64Array;
  /** t_sup: a supply of fewer hundredths than this reaches it. */
  readonly aimEdge: Float64Array;
  /** Of hours that air does not meet, °C. */
  readonly wetBulbC: Float64Array;
  /** Air between the stages of a two-stage plant and its wet bulb, °C; how far a dew-point stage cools at full effect, K. */
  readonly betweenC: Float64Array;
  readonly betweenWetC: Float64Array;
  readonly dewPointFallK: Float64Array;
  /** Of unmet hours: T*, °C, Infinity without any; the place in the brief's order of the stage that gives it, and its share. */
  readonly lowestC: Float64Array;
  readonly lowestNth: Int8Array;
  readonly lowestShare: Float64Array;
  /** The lowest supply without caps, °C, and the one at which outdoor moisture alone is at a cap. */
  readonly uncappedC: Float64Array;
  readonly dryEdgeC: Float64Array;
}

const numbers = () => new Float64Array(SLOTS_PER_LEAP_YEAR);
const list = (): HourList => ({ places: new Uint16Array(SLOTS_PER_LEAP_YEAR), count: 0 });

export function roomHours(): RoomHours {
  return {
    unmetByAir: list(),
    wet: list(),
    unmet: list(),
    mayWet: new Uint8Array(SLOTS_PER_LEAP_YEAR),
    ratioUnderCaps: numbers(),
    aimEdge: numbers(),
    wetBulbC: numbers(),
    betweenC: numbers(),
    betweenWetC: numbers(),
    dewPointFallK: numbers(),
    lowestC: numbers(),
    lowestNth: new Int8Array(SLOTS_PER_LEAP_YEAR),
    lowestShare: numbers(),
    uncappedC: numbers(),
    dryEdgeC: numbers(),
  };
}
