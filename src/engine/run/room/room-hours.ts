/** Where the demand hours of `block` are worked out, one column per figure, by place; nothing of it is part of a result. */
import { HOURS_PER_BLOCK } from '../hour-columns.ts';

/** Some hours by their places. */
interface HourList {
  readonly places: Uint16Array;
  count: number;
}

const list = (): HourList => ({ places: new Uint16Array(HOURS_PER_BLOCK), count: 0 });
const numbers = () => new Float64Array(HOURS_PER_BLOCK);

export const room = {
  /** Hours that outdoor air does not meet and a stage may; and those that nothing meets. */
  wet: list(),
  unmet: list(),
  /** 1 where the wet stages may run. */
  mayWet: new Uint8Array(HOURS_PER_BLOCK),
  /** Supplies with less moisture than this keep the caps where they are no colder than they need be, kg/kg. */
  ratioUnderCaps: numbers(),
  /** Of hours that air does not meet, °C. */
  wetBulbC: numbers(),
  /** The moist line under test, see `supply-lines.ts`: with the supply without wetting and with all of it, °C. */
  top: numbers(),
  bottom: numbers(),
  fanRiseK: numbers(),
  dryC: numbers(),
  fullC: numbers(),
};
