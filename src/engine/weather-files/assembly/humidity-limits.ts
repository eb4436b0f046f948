/** A relative humidity over 100 % and a dew point above the dry bulb: rounding is mended, more is left out. */
import { hundredths } from '../../conventions.ts';
import { type BelowZeroPhase, relativeHumidityOfDewPointPct } from '../../psychrometrics/moist-air.ts';
import { monthNames, monthOfEachSlot } from '../../reduction/calendar.ts';
import { type FindingList, linesPhrase, whole } from '../finding-list.ts';
import { VALUE } from './source-rows.ts';
import { forEachRun, linesOfRun, type StepColumns } from './step-columns.ts';

const ROUNDING_RH_PCT = 105;
const ROUNDING_DEW_HUNDREDTHS = 50;
const MONTH_SHARE = 0.2;
const YEAR_SHARE = 0.01;
const AGREED_WITHIN_POINTS = 5;
const AGREED_SHARE = 0.98;

/** RH over 100 to 105 % is taken as 100; more, and 0 or less, is left out. */
export function limitRelativeHumidity(steps: StepColumns, findings: FindingList): void {
  const column = steps.relativeHumidityPct;
  const over = new Uint8Array(column.length);
  for (let step = 0; step < column.length; step++) {
    const value = column[step] ?? Number.NaN;
    if (value > 100) over[step] = 1;
    else if (value <= 0) column[step] = Number.NaN;
  }
  forEachRun(over, (start, end) => {
    const most = column.subarray(start, end).reduce((a, b) => Math.max(a, b), 0);
    const { first, last } = linesOfRun(steps.lines, start, end);
    const done = most <= ROUNDING_RH_PCT ? 'taken as 100 %' : 'up to 105 % taken as 100 %, more left out';
    findings.add({
      code: 'rh-over-100',
      severity: 'repair',
      variable: 'relative humidity',
      done,
      line: first,
      lastLine: last,
      count: end - start,
      message: () => `${linesPhrase(first, last)}: a relative humidity of ${most} %; ${done}.`,
    });
  });
  for (let step = over.indexOf(1); step >= 0; step = over.indexOf(1, step + 1)) {
    const mended = (column[step] ?? Number.NaN) <= ROUNDING_RH_PCT;
    column[step] = mended ? 100 : Number.NaN;
    if (mended) steps.repaired[step] = (steps.repaired[step] ?? 0) | VALUE.relativeHumidity;
  }
}

/**
 * A dew point at most 0.5 K above the dry bulb is lowered to it; more is left out; a month of which a fifth is so loses its
 * dew points; a file of which 1 % is so is refused, unless its relative humidity is there and agrees elsewhere.
 * @returns whether the dew-point column is too poor to be used, so that the relative humidity must serve
 */
export function limitDewPoint(steps: StepColumns, belowZero: BelowZeroPhase, findings: FindingList): boolean {
  const { excess, far, farSteps, near } = dewPointExcess(steps);
  tellExcess({ steps, excess, marks: near, large: false }, findings);
  tellExcess({ steps, excess, marks: far, large: true }, findings);
  for (let step = near.indexOf(1); step >= 0; step = near.indexOf(1, step + 1)) {
    steps.dewPointC[step] = steps.dryBulbC[step] ?? Number.NaN;
    steps.repaired[step] = (steps.repaired[step] ?? 0) | VALUE.dewPoint;
  }
  for (let step = far.indexOf(1); step >= 0; step = far.indexOf(1, step + 1)) steps.dewPointC[step] = Number.NaN;
  if (farSteps > 0) dropPoorMonths(steps, far, findings);
  if (farSteps <= YEAR_SHARE * excess.length) return false;
  if (relativeHumidityAgrees(steps, belowZero)) return true;
  findings.add({
    code: 'dew-above-dry',
    severity: 'refuse',
    variable: 'dew point',
    count: farSteps,
    message: () =>
      `The dew point lies more than 0.5 K above the dry bulb in ${whole(farSteps / steps.stepsPerHour)} hours, over 1 % of the year: the two columns do not belong together, and nothing in the file can mend that. Bring the file anew from its source.`,
  });
  return true;
}

/**
 * How far each dew point lies above its dry bulb, hundredths of a kelvin, 0 where it does not; marks where that may be rounding and
 * where it is more.
 */
function dewPointExcess(steps: StepColumns): {
  excess: Int32Array;
  near: Uint8Array;
  far: Uint8Array;
  farSteps: number;
} {
  const excess = new Int32Array(steps.dewPointC.length);
  const near = new Uint8Array(excess.length);
  const far = new Uint8Array(excess.length);
  let farSteps = 0;
  for (let step = 0; step < excess.length; step++) {
    const dewPointC = steps.dewPointC[step] ?? Number.NaN;
    const dryBulbC = steps.dryBulbC[step] ?? Number.NaN;
    if (!(dewPointC > dryBulbC)) continue;
    const over = hundredths(dewPointC) - hundredths(dryBulbC);
    excess[step] = over;
    if (over > ROUNDING_DEW_HUNDREDTHS) {
      far[step] = 1;
      farSteps++;
    } else if (over > 0) near[step] = 1;
  }
  return { excess, near, far, farSteps };
}

function tellExcess(
  input: { steps: StepColumns; excess: Int32Array; marks: Uint8Array; large: boolean },
  findings: FindingList,
): void {
  const { excess, large, marks, steps } = input;
  forEachRun(marks, (start, end) => {
    const most = excess.subarray(start, end).reduce((a, b) => Math.max(a, b), 0) / 100;
    const { first, last } = linesOfRun(steps.lines, start, end);
    const done = large ? 'the humidity is left out' : 'the dry bulb is taken as the dew point';
    findings.add({
      code: 'dew-above-dry',
      severity: large ? 'doubt' : 'repair',
      variable: 'dew point',
      done,
      line: first,
      lastLine: last,
      count: end - start,
      message: () =>
        `${linesPhrase(first, last)}: the dew point lies ${end - start === 1 ? '' : 'up to '}${most.toFixed(1)} K above the dry bulb; ${done}.`,
    });
  });
}

function dropPoorMonths(steps: StepColumns, far: Uint8Array, findings: FindingList): void {
  const months = monthOfEachSlot(steps.slotCount);
  const poor = new Float64Array(13);
  const all = new Float64Array(13);
  for (let step = 0; step < steps.dewPointC.length; step++) {
    const month = months[Math.floor(step / steps.stepsPerHour)] ?? 0;
    all[month] = (all[month] ?? 0) + 1;
    if (far[step] === 1) poor[month] = (poor[month] ?? 0) + 1;
  }
  for (let month = 1; month <= 12; month++) {
    if ((poor[month] ?? 0) < MONTH_SHARE * (all[month] ?? 0)) continue;
    for (let step = 0; step < steps.dewPointC.length; step++) {
      if (months[Math.floor(step / steps.stepsPerHour)] === month) steps.dewPointC[step] = Number.NaN;
    }
    const hours = (all[month] ?? 0) / steps.stepsPerHour;
    findings.add({
      code: 'dew-above-dry',
      severity: 'doubt',
      variable: 'dew point',
      done: 'left out',
      count: hours,
      message: () =>
        `In ${monthNames[month - 1]} the dew point lies above the dry bulb in a fifth of the hours or more; the dew points of the whole month are left out.`,
    });
  }
}

/** RH is there in 98 % of the hours with a dry bulb, and within 5 points of the dew point where that is possible. */
function relativeHumidityAgrees(steps: StepColumns, belowZero: BelowZeroPhase): boolean {
  let hours = 0;
  let present = 0;
  let compared = 0;
  let agreed = 0;
  for (let step = 0; step < steps.dryBulbC.length; step++) {
    const dryBulbC = steps.dryBulbC[step] ?? Number.NaN;
    const dewPointC = steps.dewPointC[step] ?? Number.NaN;
    const filePct = steps.relativeHumidityPct[step] ?? Number.NaN;
    if (Number.isNaN(dryBulbC)) continue;
    hours++;
    if (!Number.isNaN(filePct)) present++;
    if (Number.isNaN(filePct + dewPointC)) continue;
    compared++;
    const ofDewPct = relativeHumidityOfDewPointPct(dryBulbC, dewPointC, belowZero);
    if (Math.abs(filePct - ofDewPct) <= AGREED_WITHIN_POINTS) agreed++;
  }
  return present >= AGREED_SHARE * hours && compared > 0 && agreed >= AGREED_SHARE * compared;
}
