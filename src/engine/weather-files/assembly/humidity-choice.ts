/** Which humidity serves: decided for the whole file, never hour by hour. */
import {
  type BelowZeroPhase,
  dewPointC as dewPointOfState,
  humidityRatioColumn,
  humidityRatioFromRelativeHumidity,
  relativeHumidityOfDewPointPct,
} from '../../psychrometrics/moist-air.ts';
import { wetBulbC } from '../../psychrometrics/wet-bulb.ts';
import { type FindingList, whole } from '../finding-list.ts';
import type { StepColumns } from './step-columns.ts';

export type HumiditySource = 'dew point' | 'relative humidity';

const DISAGREES_POINTS = 5;
const NORMAL_SHARE = 0.02;
const STOP_SHARE = 0.5;
const NEARLY_ALL = 0.98;
/** Ours: in the three surveyed files with such a column the mean distance from the wet bulb was 0.4 to 0.8 K. */
const FITS_WITHIN_K = 2;

/**
 * Dew point where it is there and agrees with the relative humidity (5 points, 98 % of the hours). Up to half of the hours
 * disagreeing: dew point, with both annual results said. More: a person is asked, since the column may hold the wet bulb.
 * @returns null when the file has neither, which is told as `no-humidity`
 */
export function chooseHumidity(
  input: { steps: StepColumns; given: GivenHumidity; belowZero: BelowZeroPhase; dewPointUnfit: boolean },
  findings: FindingList,
): HumiditySource | null {
  const { belowZero, given, steps } = input;
  const { dewHours, hours, rhHours } = given;
  if (dewHours === 0 && rhHours === 0) {
    findings.add({
      code: 'no-humidity',
      severity: 'refuse',
      message: () =>
        'The file holds neither dew point nor relative humidity. The wet bulb needs one of them: bring a file that has it.',
    });
    return null;
  }
  if (rhHours > 0 && (input.dewPointUnfit || (dewHours < NEARLY_ALL * hours && dewHours < rhHours))) {
    return 'relative humidity';
  }
  const disagreement = countDisagreement(steps, belowZero);
  if (disagreement.share > STOP_SHARE) askWhatTheColumnHolds(steps, belowZero, findings);
  else if (disagreement.share > NORMAL_SHARE) {
    findings.add({
      code: 'rh-dew-disagree',
      severity: 'doubt',
      variable: 'humidity',
      done: 'the dew point is used',
      line: disagreement.firstLine,
      count: Math.round(disagreement.count / steps.stepsPerHour),
      message: () =>
        `Relative humidity and dew point disagree by more than 5 points in ${whole(disagreement.count / steps.stepsPerHour)} hours, ${(100 * disagreement.share).toFixed(1)} % of those with both, first on line ${disagreement.firstLine}. The dew point is used. ${bothResults(steps, belowZero)}`,
    });
  }
  return 'dew point';
}

/** Steps with a dry bulb, and those of them with a dew point and with a relative humidity. */
export interface GivenHumidity {
  readonly hours: number;
  readonly dewHours: number;
  readonly rhHours: number;
}

/**
 * What a file gives, counted before any test: hours that fail are missing, and no reason to read the whole file from the other
 * column, which was mostly computed from the same values.
 */
export function givenHumidity(steps: StepColumns): GivenHumidity {
  const { dewPointC, dryBulbC, relativeHumidityPct } = steps;
  const known = { hours: 0, dewHours: 0, rhHours: 0 };
  for (let step = 0; step < dryBulbC.length; step++) {
    if (Number.isNaN(dryBulbC[step])) continue;
    known.hours++;
    if (!Number.isNaN(dewPointC[step])) known.dewHours++;
    if (!Number.isNaN(relativeHumidityPct[step])) known.rhHours++;
  }
  return known;
}

function countDisagreement(
  steps: StepColumns,
  belowZero: BelowZeroPhase,
): { count: number; share: number; firstLine: number } {
  let compared = 0;
  let count = 0;
  let firstLine = 0;
  for (let step = 0; step < steps.dryBulbC.length; step++) {
    const dryBulbC = steps.dryBulbC[step] ?? Number.NaN;
    const dewPointC = steps.dewPointC[step] ?? Number.NaN;
    const filePct = steps.relativeHumidityPct[step] ?? Number.NaN;
    if (Number.isNaN(dryBulbC + dewPointC + filePct)) continue;
    compared++;
    if (Math.abs(filePct - relativeHumidityOfDewPointPct(dryBulbC, dewPointC, belowZero)) <= DISAGREES_POINTS) continue;
    count++;
    if (firstLine === 0) firstLine = steps.lines[step] ?? 0;
  }
  return { count, share: compared === 0 ? 0 : count / compared, firstLine };
}

/** Humidity ratio of each step from one of the two columns; NaN where something is missing. */
export function humidityRatios(
  input: { steps: StepColumns; dryBulbC: Float64Array; belowZero: BelowZeroPhase },
  source: HumiditySource,
): Float64Array {
  const { belowZero, dryBulbC, steps } = input;
  return source === 'dew point'
    ? humidityRatioColumn({ dryBulbC, dewPointC: steps.dewPointC, pressurePa: steps.pressurePa, belowZero })
    : ratiosFromRelativeHumidity(input);
}

function ratiosFromRelativeHumidity(input: {
  steps: StepColumns;
  dryBulbC: Float64Array;
  belowZero: BelowZeroPhase;
}): Float64Array {
  const { belowZero, steps } = input;
  const ratios = new Float64Array(input.dryBulbC.length);
  for (let step = 0; step < ratios.length; step++) {
    const dryBulbC = input.dryBulbC[step] ?? Number.NaN;
    const pressurePa = steps.pressurePa[step] ?? Number.NaN;
    const relativeHumidityPct = steps.relativeHumidityPct[step] ?? Number.NaN;
    ratios[step] = Number.isNaN(dryBulbC + pressurePa + relativeHumidityPct)
      ? Number.NaN
      : humidityRatioFromRelativeHumidity({ dryBulbC, relativeHumidityPct, pressurePa, belowZero });
  }
  return ratios;
}

/** The year's mean wet bulb by either column, over the hours that have both. */
function bothResults(steps: StepColumns, belowZero: BelowZeroPhase): string {
  const input = { steps, dryBulbC: steps.dryBulbC, belowZero };
  const fromDew = humidityRatios(input, 'dew point');
  const fromRh = humidityRatios(input, 'relative humidity');
  const sums = { hours: 0, dew: 0, rh: 0 };
  for (let step = 0; step < fromDew.length; step++) {
    const dew = fromDew[step] ?? Number.NaN;
    const rh = fromRh[step] ?? Number.NaN;
    if (Number.isNaN(dew + rh)) continue;
    const dryBulbC = steps.dryBulbC[step] ?? Number.NaN;
    const pressurePa = steps.pressurePa[step] ?? Number.NaN;
    sums.hours++;
    sums.dew += wetBulbC(dryBulbC, dew, pressurePa);
    sums.rh += wetBulbC(dryBulbC, rh, pressurePa);
  }
  if (sums.hours === 0) return 'Without a pressure the two cannot be compared.';
  const mean = (sum: number) => (sum / sums.hours).toFixed(2);
  return `The mean wet bulb is ${mean(sums.dew)} °C by the dew point and ${mean(sums.rh)} °C by the relative humidity.`;
}

/** Whether the dew-point column fits the wet bulb of dry bulb and relative humidity better than their dew point. */
function askWhatTheColumnHolds(steps: StepColumns, belowZero: BelowZeroPhase, findings: FindingList): void {
  const ratios = humidityRatios({ steps, dryBulbC: steps.dryBulbC, belowZero }, 'relative humidity');
  let compared = 0;
  let fromWet = 0;
  let fromDew = 0;
  for (let step = 0; step < ratios.length; step++) {
    const ratio = ratios[step] ?? Number.NaN;
    const column = steps.dewPointC[step] ?? Number.NaN;
    if (Number.isNaN(ratio + column)) continue;
    const dryBulbC = steps.dryBulbC[step] ?? Number.NaN;
    const pressurePa = steps.pressurePa[step] ?? Number.NaN;
    compared++;
    fromWet += Math.abs(column - wetBulbC(dryBulbC, ratio, pressurePa));
    fromDew += Math.abs(column - dewPointOfState(dryBulbC, ratio, pressurePa));
  }
  const isWet = compared > 0 && fromWet < fromDew && fromWet <= FITS_WITHIN_K * compared;
  const off = (sum: number) => `${(sum / Math.max(1, compared)).toFixed(1)} K`;
  const evidence = isWet
    ? `The column fits the wet bulb to ${off(fromWet)} and the dew point only to ${off(fromDew)}: it seems to hold the wet bulb.`
    : `The column fits neither the dew point (${off(fromDew)} off) nor the wet bulb (${off(fromWet)} off).`;
  findings.ask('dew-is-wet-bulb', {
    count: compared,
    message: () =>
      `Relative humidity and dew point disagree by more than 5 points in over half of the hours. ${evidence} The dew-point column has been used as it stands meanwhile.`,
    proposal: isWet ? 'Read the dew-point column as wet bulb.' : 'Use the relative humidity.',
  });
}
