import { type HourClass, hourClasses } from '../hour-classes/hour-class.ts';
import type { JudgedYear } from './judged-year.ts';
import type { Ledger } from './run-result.ts';

/**
 * Counts the classes of a judged year.
 * @throws RangeError when the classes do not add up to the hours of the year
 */
export function tallyLedger(judged: JudgedYear): Ledger {
  const { demandHours, classCodes, slots } = judged;
  const classes = countClasses(classCodes);
  const ledger = {
    hours: slots,
    classes,
    dampOutside: demandHours.filter(({ judgement }) => judgement.dampBy === 'outside').length,
    dampPlant: demandHours.filter(({ judgement }) => judgement.dampBy === 'plant').length,
    demand: slots - classes.closed - classes.missing - classes.idle,
    met: demandHours.filter(({ judgement }) => judgement.met).length,
  };
  assertAddsUp(ledger, demandHours.length);
  return ledger;
}

/** Every class with its count, 0 where there is none. */
function countClasses(classCodes: Uint8Array): Record<HourClass, number> {
  const counts = hourClasses.map(() => 0);
  for (const code of classCodes) counts[code] = (counts[code] ?? 0) + 1;
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
