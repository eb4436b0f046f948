/**
 * Station pressure: the file's own; without any, the standard atmosphere at the elevation. Spikes and ramps are replaced,
 * gaps are filled, and the mean is held against the elevation, since sea-level pressure or a wrong elevation costs up to a
 * kelvin of wet bulb. The cases exclude one another, so they stand together, though the file is long for it.
 */
import { medianOf } from '../../order-statistic.ts';
import { standardPressurePa } from '../../psychrometrics/pressure.ts';
import { type FindingList, linesPhrase, whole } from '../finding-list.ts';
import { VALUE } from './source-rows.ts';
import { forEachRun, linesOfRun, type StepColumns } from './step-columns.ts';

const LIMITS_PA = { low: 31_000, high: 110_000 } as const;
/** Hectopascals written into a column of pascals. */
const HECTOPASCAL_LIMITS = { low: 310, high: 1_100 } as const;
const FAR_FROM_MEDIAN = 0.06;
const CONSTANT_HOURS = 8_000;
const SEA_LEVEL_PA = 101_325;
const NEAR_SEA_LEVEL = 0.012;
const SEA_LEVEL_FROM_M = 150;
const ELEVATION_NOTE = 0.015;
const ELEVATION_ASK = 0.03;

/**
 * Fills the pressure column: afterwards it has no gap unless neither pressure nor elevation is known. Assumed values carry
 * the bit `VALUE.pressure` in `estimated`, replaced ones in `repaired`.
 * @param input.elevationM elevation of the station, m, or null when the file does not say
 * @param input.keepFar whether values far from the median of the file are kept, as long as they are possible
 */
export function settlePressure(
  input: { steps: StepColumns; elevationM: number | null; keepFar: boolean },
  findings: FindingList,
): void {
  const { elevationM, keepFar, steps } = input;
  const column = steps.pressurePa;
  const { inHectopascals, possible, reachesFar } = surveyPressure(column);
  if (inHectopascals) askAboutUnit(steps, findings);
  if (possible === 0) {
    assume(steps, elevationM, findings);
    return;
  }
  if (!inHectopascals && !keepFar && reachesFar) replaceFarValues(steps, medianOf(possibleValues(column)), findings);
  if (possible < column.length) fillGaps(steps, findings);
  flagConstant(steps, findings);
  const meanPa = meanOf(column);
  if (elevationM === null) {
    findings.add({
      code: 'elevation-missing',
      severity: 'doubt',
      message: () =>
        'The file gives no elevation. Its own pressure serves for the wet bulb; the elevation is needed to compare places by height.',
    });
    return;
  }
  compareWithElevation(meanPa, elevationM, findings);
}

function isPossible(pressurePa: number): boolean {
  return pressurePa >= LIMITS_PA.low && pressurePa <= LIMITS_PA.high;
}

function possibleValues(column: Float64Array): Float64Array {
  const known = new Float64Array(column.length);
  let count = 0;
  for (let step = 0; step < column.length; step++) {
    const value = column[step] ?? Number.NaN;
    if (isPossible(value)) known[count++] = value;
  }
  return known.subarray(0, count);
}

function meanOf(values: Float64Array): number {
  let sum = 0;
  for (let step = 0; step < values.length; step++) sum += values[step] ?? Number.NaN;
  return sum / values.length;
}

/** What decides which rules a column has to go through, in one pass, since every file has one. */
function surveyPressure(column: Float64Array): {
  /** Most values are hectopascals. */
  inHectopascals: boolean;
  /** Values that a pressure can have. */
  possible: number;
  /** Whether any value can lie more than 6 % from the median: not when all of them lie closer together. */
  reachesFar: boolean;
} {
  let present = 0;
  let hectopascals = 0;
  let possible = 0;
  let least = Number.POSITIVE_INFINITY;
  let most = Number.NEGATIVE_INFINITY;
  for (let step = 0; step < column.length; step++) {
    const value = column[step] ?? Number.NaN;
    if (Number.isNaN(value)) continue;
    present++;
    if (isPossible(value)) possible++;
    else if (value >= HECTOPASCAL_LIMITS.low && value <= HECTOPASCAL_LIMITS.high) hectopascals++;
    if (value < least) least = value;
    if (value > most) most = value;
  }
  const inHectopascals = present > 0 && hectopascals > present / 2;
  return { inHectopascals, possible, reachesFar: !(most - least < FAR_FROM_MEDIAN * least) };
}

function askAboutUnit(steps: StepColumns, findings: FindingList): void {
  const present = steps.pressurePa.filter((value) => !Number.isNaN(value));
  const { first, last } = linesOfRun(steps.lines, 0, steps.lines.length);
  findings.ask('unit-guess', {
    line: first,
    lastLine: last,
    count: present.length,
    message: () =>
      `The pressure column holds values near ${whole(medianOf(present))}. The format wants pascals; these look like hectopascals.`,
    proposal: 'Read the pressure as hectopascals: multiply it by 100.',
  });
}

function assume(steps: StepColumns, elevationM: number | null, findings: FindingList): void {
  if (elevationM === null) {
    findings.ask('elevation-missing', {
      message: () =>
        'The file gives neither station pressure nor elevation, and the wet bulb needs one of them. Say the elevation of the station.',
      proposal: null,
    });
    steps.pressurePa.fill(Number.NaN);
    return;
  }
  const standardPa = standardPressurePa(elevationM);
  for (let step = 0; step < steps.pressurePa.length; step++) {
    steps.pressurePa[step] = standardPa;
    steps.estimated[step] = (steps.estimated[step] ?? 0) | VALUE.pressure;
  }
  findings.add({
    code: 'pressure-assumed',
    severity: 'note',
    variable: 'pressure',
    done: 'filled',
    count: steps.slotCount,
    message: () =>
      `The file gives no usable pressure; the standard atmosphere at ${elevationM} m, ${whole(standardPa)} Pa, is taken in every hour.`,
  });
}

/** Impossible values, and those more than 6 % from the median: the standard atmosphere scaled to the median. */
function replaceFarValues(steps: StepColumns, medianPa: number, findings: FindingList): void {
  const column = steps.pressurePa;
  const far = new Uint8Array(column.length);
  for (let step = 0; step < column.length; step++) {
    if (Math.abs((column[step] ?? Number.NaN) - medianPa) > FAR_FROM_MEDIAN * medianPa) far[step] = 1;
  }
  forEachRun(far, (start, end) => {
    const { first, last } = linesOfRun(steps.lines, start, end);
    const worst = column
      .subarray(start, end)
      .reduce((a, b) => (Math.abs(b - medianPa) > Math.abs(a - medianPa) ? b : a), medianPa);
    findings.add({
      code: 'pressure-range',
      severity: 'repair',
      variable: 'pressure',
      done: 'replaced by the median',
      line: first,
      lastLine: last,
      count: end - start,
      message: () =>
        `${linesPhrase(first, last)}: a pressure of ${whole(worst)} Pa lies more than 6 % from the median of the file, ${whole(medianPa)} Pa; the median is taken instead.`,
    });
  });
  for (let step = far.indexOf(1); step >= 0; step = far.indexOf(1, step + 1)) {
    column[step] = medianPa;
    steps.repaired[step] = (steps.repaired[step] ?? 0) | VALUE.pressure;
  }
}

/** Gap rule 4: the standard atmosphere at the elevation scaled by the file's mean ratio, which is the file's mean. */
function fillGaps(steps: StepColumns, findings: FindingList): void {
  const column = steps.pressurePa;
  const meanPa = meanOf(possibleValues(column));
  let filled = 0;
  let first = 0;
  for (let step = 0; step < column.length; step++) {
    if (isPossible(column[step] ?? Number.NaN)) continue;
    column[step] = meanPa;
    steps.repaired[step] = (steps.repaired[step] ?? 0) | VALUE.pressure;
    const line = steps.lines[step] ?? 0;
    if (line === 0) continue;
    filled++;
    if (first === 0) first = line;
  }
  if (filled === 0) return;
  findings.add({
    code: 'pressure-assumed',
    severity: 'note',
    variable: 'pressure',
    done: 'filled',
    line: first,
    count: filled,
    message: () =>
      `The pressure is missing on ${whole(filled)} ${filled === 1 ? 'line' : 'lines'}, first on line ${first}; the mean of the file, ${whole(meanPa)} Pa, is taken there.`,
  });
}

function flagConstant(steps: StepColumns, findings: FindingList): void {
  const { candidate: value, most } = candidateForMost(steps);
  if (most < CONSTANT_HOURS * steps.stepsPerHour) return;
  const constant = new Uint8Array(steps.pressurePa.length);
  let count = 0;
  for (let step = 0; step < constant.length; step++) {
    if (steps.pressurePa[step] !== value || isRepaired(steps, step)) continue;
    constant[step] = 1;
    count++;
  }
  if (count < CONSTANT_HOURS * steps.stepsPerHour) return;
  for (let step = 0; step < constant.length; step++) {
    if (constant[step] === 1) steps.estimated[step] = (steps.estimated[step] ?? 0) | VALUE.pressure;
  }
  findings.add({
    code: 'pressure-constant',
    severity: 'note',
    variable: 'pressure',
    done: 'marked as assumed',
    count: Math.round(count / steps.stepsPerHour),
    message: () =>
      `The pressure is ${whole(value)} Pa in ${whole(count / steps.stepsPerHour)} hours: the source filled it, and it is marked as assumed.`,
  });
}

function isRepaired(steps: StepColumns, step: number): boolean {
  return ((steps.repaired[step] ?? 0) & VALUE.pressure) !== 0;
}

/**
 * The only value of the file that can stand in more than half of the steps, and in how many it can (the vote of R. S. Boyer and
 * J. S. Moore).
 */
function candidateForMost(steps: StepColumns): { candidate: number; most: number } {
  let voters = 0;
  let candidate = Number.NaN;
  let lead = 0;
  for (let step = 0; step < steps.pressurePa.length; step++) {
    if (isRepaired(steps, step)) continue;
    const value = steps.pressurePa[step] ?? Number.NaN;
    voters++;
    if (lead === 0) candidate = value;
    lead += value === candidate ? 1 : -1;
  }
  return { candidate, most: (voters + lead) / 2 };
}

function compareWithElevation(meanPa: number, elevationM: number, findings: FindingList): void {
  const standardPa = standardPressurePa(elevationM);
  const ratio = meanPa / standardPa - 1;
  const difference = `${Math.abs(100 * ratio).toFixed(1)} % ${ratio < 0 ? 'below' : 'above'}`;
  if (elevationM > SEA_LEVEL_FROM_M && Math.abs(meanPa / SEA_LEVEL_PA - 1) <= NEAR_SEA_LEVEL) {
    findings.ask('pressure-sea-level', {
      message: () =>
        `The mean pressure is ${whole(meanPa)} Pa at ${elevationM} m, ${difference} the standard atmosphere there: this looks like sea-level pressure in the column of station pressure.`,
      proposal: `Convert it to station pressure at ${elevationM} m.`,
    });
    return;
  }
  const sentence = `The mean pressure, ${whole(meanPa)} Pa, is ${difference} the standard atmosphere at the elevation that the file gives, ${elevationM} m (${whole(standardPa)} Pa)`;
  if (Math.abs(ratio) > ELEVATION_ASK) {
    findings.ask('pressure-elevation', {
      message: () => `${sentence}. One of the two is wrong. The pressure column has been used meanwhile.`,
      proposal: `Keep the pressure, which belongs to about ${whole(elevationOfPressure(meanPa))} m, and correct the elevation.`,
    });
  } else if (Math.abs(ratio) > ELEVATION_NOTE) {
    findings.add({
      code: 'pressure-elevation',
      severity: 'note',
      variable: 'pressure',
      done: 'the pressure is used',
      message: () => `${sentence}. The pressure column is used.`,
    });
  }
}

/** Elevation, to 10 m, at which the standard atmosphere has a pressure (ASHRAE Fundamentals 2017 ch. 1 eq. 3 solved for z). */
function elevationOfPressure(pressurePa: number): number {
  const elevationM = (1 - (pressurePa / SEA_LEVEL_PA) ** (1 / 5.2559)) / 2.25577e-5;
  return Math.round(elevationM / 10) * 10;
}
