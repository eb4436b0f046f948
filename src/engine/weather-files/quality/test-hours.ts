import { MISSING_INT16 } from '../../conventions.ts';
import { DEW_POINT_LIMITS_C, DRY_BULB_LIMITS_C, leaveOutImpossible } from '../assembly/range-limits.ts';
import type { StepColumns } from '../assembly/step-columns.ts';
import type { FindingList } from '../finding-list.ts';
import type { DeclaredStation } from '../weather-file-reading.ts';
import { continentalRecord } from './continental-record.ts';
import { otherClimate } from './other-climate.ts';
import { isOff, type QualityOptions, type RuleName } from './quality-options.ts';
import { repeatedDays } from './repeated-days.ts';
import { sameHours } from './same-hours.ts';
import { sawTooth } from './saw-tooth.ts';
import { spikes } from './spike.ts';
import { stepTest, tellJumps } from './step-test.ts';
import { straightLines } from './straight-line.ts';
import { stuckAlone } from './stuck-alone.ts';
import { stuckTogether } from './stuck-together.ts';
import { type TestedColumn, type TestedHours, testedHours } from './tested-hours.ts';
import { zeroFill } from './zero-fill.ts';

type Test = (hours: TestedHours, station: DeclaredStation, findings: FindingList) => void;

/** The tests in their order: range, step, straight line, persistence, spike. An hour that is missing by then is not tested again. */
const TESTS: readonly (readonly [RuleName, Test])[] = [
  ['zero-fill', (hours, _station, findings) => zeroFill(hours, findings)],
  ['other-climate', (hours, _station, findings) => otherClimate(hours, findings)],
  ['range', continentalRecord],
  ['step', (hours, _station, findings) => stepTest(hours, findings)],
  ['straight-line', (hours, _station, findings) => straightLines(hours, findings)],
  ['stuck', (hours, _station, findings) => stuckTogether(hours, findings)],
  ['stuck', (hours, _station, findings) => stuckAlone(hours, findings)],
  ['stuck', (hours, _station, findings) => repeatedDays(hours, findings)],
  ['stuck', (hours, _station, findings) => sameHours(hours, findings)],
  ['spike', (hours, _station, findings) => spikes(hours, findings)],
  ['saw-tooth', (hours, _station, findings) => sawTooth(hours, findings)],
  ['step', (hours, _station, findings) => tellJumps(hours, findings)],
];

/**
 * Tests the temperatures of a year against each other: what fails becomes NaN in `steps` and is told. What no weather reaches is
 * left out first, whatever is switched off.
 * @param input.typical whether the months come from different years, so that nothing is compared across their joints
 */
export function testHours(
  input: { steps: StepColumns; station: DeclaredStation; typical: boolean; options: QualityOptions },
  findings: FindingList,
): void {
  const { options, station, steps, typical } = input;
  const hours = testedHours(steps, typical);
  if (reaches(hours.dryBulb, DRY_BULB_LIMITS_C) || reaches(hours.dewPoint, DEW_POINT_LIMITS_C)) {
    leaveOutImpossible(steps, findings);
    noteImpossible(hours, hours.dryBulb, steps.dryBulbC);
    noteImpossible(hours, hours.dewPoint, steps.dewPointC);
  }
  for (const [rule, test] of TESTS) if (!isOff(rule, options)) test(hours, station, findings);
}

/** Whether any value reaches a limit: nearly no file has one, and the range is then not looked at closely. */
function reaches({ bounds }: TestedColumn, limits: { low: number; high: number }): boolean {
  return bounds.least <= bounds.most && (bounds.least <= 100 * limits.low || bounds.most >= 100 * limits.high);
}

/** What the range has left out is missing for the tests as well. */
function noteImpossible(hours: TestedHours, { bit, values }: TestedColumn, column: Float64Array): void {
  for (let step = 0; step < values.length; step++) {
    if (values[step] === MISSING_INT16 || !Number.isNaN(column[step])) continue;
    values[step] = MISSING_INT16;
    hours.failed[step] = (hours.failed[step] ?? 0) | bit;
    hours.failedAlone.push(step);
  }
}
