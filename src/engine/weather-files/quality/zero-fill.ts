import { MISSING_INT16 } from '../../conventions.ts';
import type { FindingList } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { leaveOutHour, type TestedHours } from './tested-hours.ts';

const SHORTEST_H = 2;
/** Ours: fog at 0 °C holds a dry bulb and a dew point of 0 as well, but its relative humidity says so. */
const FOG_FROM_PCT = 90;
/** Ours, where a file has no relative humidity: fog at 0 °C comes out of hours near 0 °C. */
const FOG_WITHIN = 300;

/**
 * Zeros that stand for nothing, for 2 successive hours and more: dry bulb and dew point both exactly 0 °C, or a relative humidity
 * of 0 beside a pressure of 0 (which is read as none). Every temperature and humidity of these hours is left out. Saturated air
 * of 0 °C is kept.
 */
export function zeroFill(hours: TestedHours, findings: FindingList): void {
  const shortest = SHORTEST_H * hours.steps.stepsPerHour;
  const { relativeHumidityPct } = hours.steps;
  const { values } = hours.dryBulb;
  const { length } = values;
  for (let step = 0; step < length; step++) {
    if (values[step] !== 0 && relativeHumidityPct[step] !== 0) continue;
    if (!isZero(hours, step)) continue;
    const start = step;
    while (step < length && isZero(hours, step)) step++;
    if (step - start < shortest || isFog(hours, start, step)) continue;
    tellSpan(
      hours,
      {
        start,
        end: step,
        code: 'zero-fill',
        severity: 'doubt',
        variable: 'every value',
        done: 'left out',
        sentence: () => 'zeros stand where values should be, hour after hour; these hours are left out.',
      },
      findings,
    );
    for (let each = start; each < step; each++) leaveOutHour(hours, each);
  }
}

function isZero({ dewPoint, dryBulb, pressureGiven, steps }: TestedHours, step: number): boolean {
  if (dryBulb.values[step] === 0 && dewPoint.values[step] === 0) return true;
  // A pressure that is missing only here: the column is there elsewhere.
  return pressureGiven && steps.relativeHumidityPct[step] === 0 && Number.isNaN(steps.pressurePa[step]);
}

function isFog({ dryBulb, steps }: TestedHours, start: number, end: number): boolean {
  for (let step = start; step < end; step++) {
    if ((steps.relativeHumidityPct[step] ?? 100) < FOG_FROM_PCT) return false;
  }
  if (!Number.isNaN(steps.relativeHumidityPct[start])) return true;
  const before = dryBulb.values[start - 1] ?? MISSING_INT16;
  const after = dryBulb.values[end] ?? MISSING_INT16;
  return Math.abs(before) <= FOG_WITHIN && Math.abs(after) <= FOG_WITHIN;
}
