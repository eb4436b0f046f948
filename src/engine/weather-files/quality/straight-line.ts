import { MISSING_INT16 } from '../../conventions.ts';
import type { FindingList } from '../finding-list.ts';
import { tellSpan } from './tell-span.ts';
import { leaveOutHour, type TestedColumn, type TestedHours } from './tested-hours.ts';

const SHORTEST_H = 5;
/** Ours: a line that goes on from a failed one needs no more than this. */
const JOINED_H = 3;
/** Ours: a single value that only leads up to a failed one lies at least this far, 0.01 K, from both its neighbours. */
const SINGLE_FROM = 1_200;

/**
 * Lines that the source has drawn from a bad value: where a temperature failed range or step, an exact straight line (to the
 * file's rounding, of dry bulb and dew point together, 5 hours and more, not level) that begins or ends there is left out up to
 * its other end, and so are the lines and the single value joined to it. The ends that no test fails are kept.
 */
export function straightLines(hours: TestedHours, findings: FindingList): void {
  if (hours.failedAlone.length === 0) return;
  const failed = Int32Array.from(hours.failedAlone).sort();
  linesFrom(hours, { failed, direction: 1 }, findings);
  linesFrom(hours, { failed: failed.reverse(), direction: -1 }, findings);
}

function linesFrom(
  hours: TestedHours,
  { failed, direction }: { failed: Int32Array; direction: 1 | -1 },
  findings: FindingList,
): void {
  let reached = direction === 1 ? -1 : hours.steps.lines.length;
  for (const from of failed) {
    // What an earlier line went over needs no second look.
    if ((from - reached) * direction < 0) continue;
    const first = lineFrom(hours, from, direction);
    if (first < SHORTEST_H * hours.steps.stepsPerHour) continue;
    reached = from + direction * first;
    if (isLevel(hours, from, reached)) continue;
    reached = endOfJoined(hours, reached, direction);
    const lead = beginningOf(hours, from, direction === 1 ? -1 : 1);
    for (let step = lead; step !== reached; step += direction) leaveOutHour(hours, step);
    tellLine(hours, direction === 1 ? [lead, reached] : [reached + 1, lead + 1], findings);
  }
}

function tellLine(hours: TestedHours, [start, end]: readonly [number, number], findings: FindingList): void {
  tellSpan(
    hours,
    {
      start,
      end,
      code: 'straight-line',
      severity: 'doubt',
      variable: 'every value',
      done: 'left out',
      sentence: () =>
        'dry bulb and dew point run on exact straight lines from a value that cannot be: the source has drawn them through a gap. They are left out.',
    },
    findings,
  );
}

/** Where the lines end that go on from the end of another. */
function endOfJoined(hours: TestedHours, from: number, direction: 1 | -1): number {
  let end = from;
  for (;;) {
    const next = lineFrom(hours, end, direction);
    if (next < JOINED_H * hours.steps.stepsPerHour || isLevel(hours, end, end + direction * next)) return end;
    end += direction * next;
  }
}

/** Steps over which both temperatures, as read, follow a line from their first value. */
function lineFrom({ dewPoint, dryBulb }: TestedHours, from: number, direction: 1 | -1): number {
  const dry = new Line(dryBulb, from);
  const dew = new Line(dewPoint, from);
  let length = 0;
  while (dry.reaches(length + 1, direction) && dew.reaches(length + 1, direction)) length++;
  return length;
}

/** A line through the first value of a column that stays within its rounding: each end and each value by half a grain. */
class Line {
  readonly #column: TestedColumn;
  readonly #from: number;
  #leastSlope = Number.NEGATIVE_INFINITY;
  #mostSlope = Number.POSITIVE_INFINITY;

  constructor(column: TestedColumn, from: number) {
    this.#column = column;
    this.#from = from;
  }

  /** Whether it goes on to the value so many steps away; asked for one step after the other. */
  reaches(steps: number, direction: 1 | -1): boolean {
    const { asRead, resolution } = this.#column;
    const first = asRead[this.#from] ?? MISSING_INT16;
    const value = asRead[this.#from + direction * steps] ?? MISSING_INT16;
    if (first === MISSING_INT16 || value === MISSING_INT16) return false;
    this.#leastSlope = Math.max(this.#leastSlope, (value - first - resolution.finest) / steps);
    this.#mostSlope = Math.min(this.#mostSlope, (value - first + resolution.finest) / steps);
    return this.#leastSlope <= this.#mostSlope;
  }
}

function isLevel({ dryBulb }: TestedHours, from: number, to: number): boolean {
  return Math.abs((dryBulb.asRead[from] ?? 0) - (dryBulb.asRead[to] ?? 0)) <= dryBulb.resolution.finest;
}

/**
 * Where what is joined to the other side of a failed value begins: a line, or a single value that only leads up to it; the failed
 * step itself when there is neither.
 */
function beginningOf(hours: TestedHours, failed: number, direction: 1 | -1): number {
  const end = endOfJoined(hours, failed, direction);
  if (end !== failed) return end - direction;
  const at = (away: number) => hours.dryBulb.asRead[failed + away * direction] ?? MISSING_INT16;
  if (at(1) === MISSING_INT16 || at(2) === MISSING_INT16) return failed;
  const inwards = at(0) - at(1);
  const outwards = at(1) - at(2);
  const leads = Math.sign(inwards) === Math.sign(outwards);
  return leads && Math.min(Math.abs(inwards), Math.abs(outwards)) >= SINGLE_FROM ? failed + direction : failed;
}
