import { MISSING_INT16 } from '../../conventions.ts';
import { VALUE } from '../assembly/source-rows.ts';
import type { FindingList } from '../finding-list.ts';
import { weatherOf } from './outflow.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, type Jump, leaveOut, type StepSpan, type TestedHours } from './tested-hours.ts';

const FAILS_FROM = 2_000;
const TOLD_FROM = 1_200;
/** Ours: how long after a failed value the next ones are held against the last good one. */
const REACH_H = 6;
/** Ours: of two values that are too far apart, the one further from the median of the hours around both has failed. */
const AROUND_H = 12;
const DEW_ABOVE_DRY = 50;
/** Values around a step, used again for each: files of one-minute records may have many steps. */
const around = new Int16Array(2 * AROUND_H + 2);

/**
 * Changes of the dry bulb from one hour to the next, not across the joints of a typical year. From 20 K a value fails, unless the
 * change is weather (see `outflow.ts`); from 12 K the change is kept for `tellJumps`.
 */
export function stepTest(hours: TestedHours, findings: FindingList): void {
  const { bounds, values } = hours.dryBulb;
  if (bounds.change < TOLD_FROM) return;
  for (const { start, end } of hours.unbroken) {
    for (let step = start + 1; step < end; step++) {
      const change = (values[step] ?? 0) - (values[step - 1] ?? 0);
      if (change < TOLD_FROM && change > -TOLD_FROM) continue;
      if (values[step] === MISSING_INT16 || values[step - 1] === MISSING_INT16) continue;
      const weather = weatherOf(hours, step);
      if (Math.abs(change) < FAILS_FROM || weather !== null) hours.jumps.push({ step, change, weather });
      else failOne(hours, { step, start, end }, findings);
    }
  }
}

/** One of the two values of a step fails, and with it those after it that are as far from the last good one. */
function failOne(hours: TestedHours, at: StepSpan & { step: number }, findings: FindingList): void {
  const { step } = at;
  const { values } = hours.dryBulb;
  const median = medianAround(hours, at);
  const before = values[step - 1] ?? 0;
  const after = values[step] ?? 0;
  const firstFails = Math.abs(before - median) > Math.abs(after - median);
  const start = firstFails ? step - 1 : step;
  let end = start + 1;
  if (!firstFails) {
    const reach = Math.min(at.end, step + REACH_H * hours.steps.stepsPerHour);
    while (end < reach && isFar(values[end] ?? MISSING_INT16, before)) end++;
  }
  tellSpan(
    hours,
    {
      start,
      end,
      code: 'step',
      severity: 'doubt',
      variable: 'dry bulb',
      done: 'left out',
      sentence: () =>
        `the dry bulb ${after < before ? 'falls' : 'rises'} by ${degrees(Math.abs(after - before))} K in one hour, from ${degrees(before)} to ${degrees(after)} °C, and nothing says that it is weather; ${end - start === 1 ? 'the value is' : 'the values are'} left out.`,
    },
    findings,
  );
  for (let each = start; each < end; each++) {
    leaveOut(hours, each, VALUE.dryBulb);
    hours.failedAlone.push(each);
  }
}

function isFar(value: number, good: number): boolean {
  return value !== MISSING_INT16 && Math.abs(value - good) >= FAILS_FROM;
}

function medianAround({ dryBulb, steps }: TestedHours, { step, start, end }: StepSpan & { step: number }): number {
  const perHour = steps.stepsPerHour;
  let count = 0;
  // One value an hour, the two of the step among them.
  for (let at = step - 1 - AROUND_H * perHour; at <= step + AROUND_H * perHour; at += at === step - 1 ? 1 : perHour) {
    const value = at >= start && at < end ? (dryBulb.values[at] ?? MISSING_INT16) : MISSING_INT16;
    if (value !== MISSING_INT16) around[count++] = value;
  }
  return around.subarray(0, count).sort()[count >> 1] ?? 0;
}

/**
 * Tells the changes of 12 K and more that are kept: a note; a doubt where a second test has failed one of the two hours and the
 * change is not known as weather. Called when every test has spoken.
 */
export function tellJumps(hours: TestedHours, findings: FindingList): void {
  for (const jump of hours.jumps) {
    const doubtful =
      jump.weather === null && (failsElsewhere(hours, jump.step - 1) || failsElsewhere(hours, jump.step));
    tellSpan(
      hours,
      {
        start: jump.step,
        end: jump.step + 1,
        code: 'step',
        severity: doubtful ? 'doubt' : 'note',
        variable: 'dry bulb',
        done: 'kept',
        sentence: () =>
          `the dry bulb ${jump.change < 0 ? 'falls' : 'rises'} by ${degrees(Math.abs(jump.change))} K in one hour${reasonOf(jump, doubtful)}`,
      },
      findings,
    );
  }
}

function reasonOf({ weather }: Jump, doubtful: boolean): string {
  if (weather === 'outflow') return ' while the air turns moister, as in the outflow of a thunderstorm; it is kept.';
  if (weather === 'foehn') return ' while the dew point stays, as in foehn; it is kept.';
  return doubtful ? ', and another test fails the same hour.' : '; it is kept.';
}

function failsElsewhere({ dewPoint, dryBulb, failed }: TestedHours, step: number): boolean {
  if (failed[step] !== 0) return true;
  const dew = dewPoint.values[step] ?? MISSING_INT16;
  const dry = dryBulb.values[step] ?? MISSING_INT16;
  return dew !== MISSING_INT16 && dry !== MISSING_INT16 && dew - dry > DEW_ABOVE_DRY;
}
