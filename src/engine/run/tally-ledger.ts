import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import type { HourCounts } from './count-hours.ts';
import { dampReasons } from './hour-columns.ts';
import type { JudgedYear } from './judged-year.ts';
import type { Ledger } from './run-result.ts';

const OUTSIDE = dampReasons.indexOf('outside');
const PLANT = dampReasons.indexOf('plant');

/**
 * The classes of a judged year.
 * @throws RangeError when they do not add up to the hours of the year
 */
export function tallyLedger(judged: JudgedYear, counts: HourCounts): Ledger {
  const { slots } = judged;
  const demandCount = judged.demandSlots.length;
  const classes = countClasses(judged, counts);
  const ledger = {
    hours: slots,
    classes,
    dampOutside: counts.byReason[OUTSIDE] ?? 0,
    dampPlant: counts.byReason[PLANT] ?? 0,
    demand: slots - classes.closed - classes.missing - classes.idle,
    met: demandCount - counts.unmet.count,
  };
  assertAddsUp(ledger, demandCount);
  return ledger;
}

/** Every class with its count, 0 where there is none. */
function countClasses({ withoutDemand }: JudgedYear, { byClass }: HourCounts): Record<HourClass, number> {
  return {
    closed: withoutDemand.closed,
    missing: withoutDemand.missing,
    idle: withoutDemand.idle,
    frozen: hoursOf(byClass, 'frozen'),
    damp: hoursOf(byClass, 'damp'),
    air: hoursOf(byClass, 'air'),
    direct: hoursOf(byClass, 'direct'),
    indirect: hoursOf(byClass, 'indirect'),
    dewpoint: hoursOf(byClass, 'dewpoint'),
    twostage: hoursOf(byClass, 'twostage'),
    short: hoursOf(byClass, 'short'),
    beyond: hoursOf(byClass, 'beyond'),
  };
}

function hoursOf(byClass: Uint16Array, hourClass: HourClass): number {
  return byClass[hourClasses.indexOf(hourClass)] ?? 0;
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
