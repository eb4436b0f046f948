/** Where the demand hours of `block` are worked out, one column per figure, by place; nothing of it is part of a result. */
import { HOURS_PER_BLOCK } from '../hour-columns.ts';

/** Some hours by their places. */
export interface HourList {
  readonly places: Uint16Array;
  count: number;
}

const list = (): HourList => ({ places: new Uint16Array(HOURS_PER_BLOCK), count: 0 });
const numbers = () => new Float64Array(HOURS_PER_BLOCK);

export const room = {
  /** Hours that outdoor air does not meet and a stage may; those that nothing meets; and of these those in which water may run. */
  wet: list(),
  unmet: list(),
  wettable: list(),
  /** 1 where the wet stages may run. */
  mayWet: new Uint8Array(HOURS_PER_BLOCK),
  /** Supplies with less moisture than this keep the caps where they are no colder than they need be, kg/kg. */
  ratioUnderCaps: numbers(),
  /** Of hours that air does not meet, °C. */
  wetBulbC: numbers(),
  /** Air that enters the wetted medium of the stage under test, and the wet bulb to which that may cool it, °C. */
  entersC: numbers(),
  mediumWetC: numbers(),
  /** Hours that the stage under test meets; and that it may meet with a supply that is warmer than it need be. */
  meeting: list(),
  warm: list(),
  /** What the stage under test supplies, °C and kg/kg, at which share, and how far it cools without wetting the supply, K. */
  triedC: numbers(),
  triedRatio: numbers(),
  triedShare: numbers(),
  triedDryFallK: numbers(),
  /** The lowest supply so far without regard to caps, and within them, Infinity before there is one, °C. */
  uncappedC: numbers(),
  lowestC: numbers(),
  /** Whose it is, by place in the brief's stages (-1: outdoor air's), and at which share of full wetting. */
  lowestNth: new Int8Array(HOURS_PER_BLOCK),
  lowestShare: numbers(),
  /** The supply at which the caps are just reached with the moisture of outdoor air, °C. */
  dryEdgeC: numbers(),
  /** Moist lines under test, see `supply-lines.ts`: with the supply without wetting and with all of it, and the edge of the caps, °C. */
  lines: list(),
  /** Of them those whose edge lies between no wetting and all of it. */
  crossing: list(),
  top: numbers(),
  bottom: numbers(),
  fanRiseK: numbers(),
  dryC: numbers(),
  fullC: numbers(),
  edgeC: numbers(),
};
