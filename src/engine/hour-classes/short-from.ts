import { hundredths } from '../conventions.ts';

/** Least useful cooling: `short` lowers what is supplied by at least this, K or index points (method 5). */
const SHORT_FROM = 1;

/** Whether water lowers a figure by enough for `short` rather than `beyond`; each side is rounded first. */
export function gainsEnough(withoutWater: number, withWater: number): boolean {
  return hundredths(withoutWater) - hundredths(withWater) >= hundredths(SHORT_FROM);
}
