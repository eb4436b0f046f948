import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import { dampReasons } from './hour-columns.ts';
import type { JudgedYear } from './judged-year.ts';
import type { Ledger } from './run-result.ts';

/**
 * Counts the classes of a judged year.
 * @throws RangeError when the classes do not add up to the hours of the year
 */
export function tallyLedger(judged: JudgedYear): Ledger {
  const { hours, classCodes, slots } = judged;
  const classes = countClasses(classCodes);
  const ledger = {
    hours: slots,
    classes,
    dampOutside: countOf(hours.damp, hours.count, dampReasons.indexOf('outside')),
    dampPlant: countOf(hours.damp, hours.count, dampReasons.indexOf('plant')),
    demand: slots - classes.closed - classes.missing - classes.idle,
    met: countOf(hours.met, hours.count, 1),
  };
  assertAddsUp(ledger, hours.count);
  return ledger;
}

/** How often a value stands among the first so many of a column. */
function countOf(column: Uint8Array, count: number, value: number): number {
  let found = 0;
  for (let at = 0; at < count; at++) if (column[at] === value) found++;
  return found;
}

/** Every class with its count, 0 where there is none. */
function countClasses(classCodes: Uint8Array): Record<HourClass, number> {
  const counts = hourClasses.map(() => 0);
  for (let slot = 0; slot < classCodes.length; slot++) {
    const code = classCodes[slot] ?? 0;
    counts[code] = (counts[code] ?? 0) + 1;
  }
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
