import { MISSING_INT16 } from '../../conventions.ts';
import { type FindingList, hoursPhrase } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { degrees, leaveOut, type StepSpan, type TestedColumn, type TestedHours } from './tested-hours.ts';

/** Hours in a row by resolution, 0.01 K (HadISD). Its limits in days are for sparser reports than are read here. */
const LONGEST_H = {
  'dry bulb': { 100: 40, 50: 30, 10: 24 },
  'dew point': { 100: 80, 50: 60, 10: 48 },
} as const;
/** A dew point that stays so long is a doubt at any resolution, but on coasts it happens: it is kept. */
const DEW_DOUBT_H = 48;
/** No limit is shorter. */
const FEWEST_H = 24;
/** Steps on either side of a sample that are looked at. */
const LOOK = 3;

/** One temperature for as many hours as its resolution allows: left out; a dew point for 48 hours is told at any resolution. */
export function stuckAlone(hours: TestedHours, findings: FindingList): void {
  for (const column of [hours.dryBulb, hours.dewPoint]) {
    for (const { start, end } of hours.unbroken) {
      if (mayHoldRun(hours, { column, start, end })) runsOf(hours, { column, start, end }, findings);
    }
  }
}

/**
 * Whether a stretch may hold a run of 24 hours: one would lie over a sample every 12 hours with at least 6 on either side, so that
 * nearly every month is done after 60 looks.
 */
function mayHoldRun(hours: TestedHours, span: StepSpan & { column: TestedColumn }): boolean {
  const { values } = span.column;
  const stride = (FEWEST_H / 2) * hours.steps.stepsPerHour;
  for (let sample = span.start + stride; sample < span.end; sample += stride) {
    let value = MISSING_INT16;
    let same = true;
    for (let step = sample - LOOK; step <= sample + LOOK && same; step++) {
      const next = values[step] ?? MISSING_INT16;
      same = next === MISSING_INT16 || value === MISSING_INT16 || next === value;
      if (next !== MISSING_INT16) value = next;
    }
    if (same) return true;
  }
  return false;
}

function runsOf(hours: TestedHours, span: StepSpan & { column: TestedColumn }, findings: FindingList): void {
  const { column, end, start } = span;
  const { values } = column;
  const fewest = FEWEST_H * hours.steps.stepsPerHour;
  let value = MISSING_INT16;
  let first = start;
  let last = start;
  let count = 0;
  for (let step = start; step < end; step++) {
    const next = values[step] ?? MISSING_INT16;
    if (next === MISSING_INT16) continue;
    if (next !== value) {
      if (count >= fewest) judgeRun(hours, { column, first, last, count }, findings);
      value = next;
      first = step;
      count = 0;
    }
    last = step;
    count++;
  }
  if (count >= fewest) judgeRun(hours, { column, first, last, count }, findings);
}

function judgeRun(
  hours: TestedHours,
  run: { column: TestedColumn; first: number; last: number; count: number },
  findings: FindingList,
): void {
  const { column, count, first, last } = run;
  const perHour = hours.steps.stepsPerHour;
  const fails = count >= LONGEST_H[column.variable][column.resolution.usual] * perHour;
  if (!fails && (column.variable !== 'dew point' || count < DEW_DOUBT_H * perHour)) return;
  const value = degrees(column.values[first] ?? 0);
  tellSpan(
    hours,
    {
      start: first,
      end: last + 1,
      steps: count,
      code: 'stuck',
      severity: 'doubt',
      variable: column.variable,
      done: fails ? 'left out' : 'kept',
      sentence: () =>
        `the ${column.variable} stays at ${value} °C for ${hoursPhrase(Math.round(count / perHour))}; ${fails ? 'it is left out' : 'it is used as it stands'}.`,
    },
    findings,
  );
  if (!fails) return;
  for (let step = first; step <= last; step++) leaveOut(hours, step, column.bit);
}
