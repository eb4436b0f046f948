import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import { countCodes, dampReasons, inBlocks } from './hour-columns.ts';
import type { JudgedYear } from './judged-year.ts';
import type { Ledger } from './run-result.ts';

const OUTSIDE = dampReasons.indexOf('outside');
const PLANT = dampReasons.indexOf('plant');

/**
 * Counts the classes of a judged year.
 * @throws RangeError when the classes do not add up to the hours of the year
 */
export function tallyLedger(judged: JudgedYear): Ledger {
  const { hours, classCodes, slots } = judged;
  const classes = countClasses(classCodes);
  const byReason = countsOf(hours.damp, hours.count, dampReasons.length);
  const ledger = {
    hours: slots,
    classes,
    dampOutside: byReason[OUTSIDE] ?? 0,
    dampPlant: byReason[PLANT] ?? 0,
    demand: slots - classes.closed - classes.missing - classes.idle,
    met: countsOf(hours.met, hours.count, 2)[1] ?? 0,
  };
  assertAddsUp(ledger, hours.count);
  return ledger;
}

/** How often each code below `codes` stands among the first so many of a column. */
function countsOf(column: Uint8Array, count: number, codes: number): Uint16Array {
  const counts = new Uint16Array(codes);
  inBlocks(count, (from, to) => countCodes(counts, column, from, to));
  return counts;
}

/** Every class with its count, 0 where there is none. */
function countClasses(classCodes: Uint8Array): Record<HourClass, number> {
  const counts = countsOf(classCodes, classCodes.length, hourClasses.length);
  const of = (hourClass: HourClass): number => counts[hourClasses.indexOf(hourClass)] ?? 0;
  return {
    closed: of('closed'),
    missing: of('missing'),
    idle: of('idle'),
    frozen: of('frozen'),
    damp: of('damp'),
    air: of('air'),
    direct: of('direct'),
    indirect: of('indirect'),
    dewpoint: of('dewpoint'),
    twostage: of('twostage'),
    short: of('short'),
    beyond: of('beyond'),
  };
}

function assertAddsUp(ledger: Ledger, judgedHours: number): void {
  const sum = Object.values(ledger.classes).reduce((total, hours) => total + hours, 0);
  const damp = ledger.dampOutside + ledger.dampPlant;
  if (sum !== ledger.hours || damp !== ledger.classes.damp || judgedHours !== ledger.demand) {
    throw new RangeError(
      `classes do not add up: ${sum} of ${ledger.hours} hours, ${damp} of ${ledger.classes.damp} damp, ` +
        `${judgedHours} of ${ledger.demand} with demand`,
    );
  }
}
