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
  const { slots, demandCount } = judged;
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
  const of = (hourClass: HourClass): number => byClass[hourClasses.indexOf(hourClass)] ?? 0;
  return {
    closed: withoutDemand.closed,
    missing: withoutDemand.missing,
    idle: withoutDemand.idle,
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
