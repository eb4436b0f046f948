import { type BelowZeroPhase, relativeHumidityOfDewPointPct } from '../../psychrometrics/moist-air.ts';
import type { FindingList } from '../finding-list.ts';
import type { StepColumns } from './step-columns.ts';

const FEWEST_HOURS = 20;
const WITHIN_POINTS = 1;

/**
 * Whether the file's humidity below 0 °C stands for saturation over water or over ice: tested, never assumed. Over its hours
 * with dry bulb over 3 °C and dew point under -5 °C (fewer than 20: hours with dry bulb under -3 °C) the relative humidity is
 * computed with both; the nearer to the file's own holds, if it comes within 1 point on average. Else water, with a note.
 */
export function belowZeroPhase(steps: StepColumns, findings: FindingList): BelowZeroPhase {
  const warm = compare(steps, { overC: 3, dewUnderC: -5, underC: Number.POSITIVE_INFINITY });
  const enough = FEWEST_HOURS * steps.stepsPerHour;
  const test =
    warm.count >= enough
      ? warm
      : compare(steps, { overC: Number.NEGATIVE_INFINITY, dewUnderC: Number.POSITIVE_INFINITY, underC: -3 });
  if (test.count < enough) {
    note(findings, 'fewer than 20 hours with both humidities are cold enough to tell');
    return 'water';
  }
  const water = test.water / test.count;
  const ice = test.ice / test.count;
  if (Math.min(water, ice) > WITHIN_POINTS) {
    note(
      findings,
      `neither comes within 1 point of the file's relative humidity (water ${water.toFixed(1)}, ice ${ice.toFixed(1)})`,
    );
    return 'water';
  }
  return ice < water ? 'ice' : 'water';
}

function note(findings: FindingList, reason: string): void {
  findings.add({
    code: 'below-zero-phase',
    severity: 'note',
    message: () =>
      `Whether humidity below 0 °C stands for water or for ice cannot be told from the file: ${reason}. Water is taken.`,
  });
}

function compare(
  steps: StepColumns,
  hours: { overC: number; underC: number; dewUnderC: number },
): { count: number; water: number; ice: number } {
  const { dewUnderC, overC, underC } = hours;
  const sums = { count: 0, water: 0, ice: 0 };
  for (let step = 0; step < steps.dryBulbC.length; step++) {
    const dryBulbC = steps.dryBulbC[step] ?? Number.NaN;
    const dewPointC = steps.dewPointC[step] ?? Number.NaN;
    const filePct = steps.relativeHumidityPct[step] ?? Number.NaN;
    const taken = dryBulbC > overC && dryBulbC < underC && dewPointC < dewUnderC && dewPointC <= dryBulbC;
    if (!taken || Number.isNaN(filePct)) continue;
    sums.count++;
    sums.water += Math.abs(filePct - relativeHumidityOfDewPointPct(dryBulbC, dewPointC, 'water'));
    sums.ice += Math.abs(filePct - relativeHumidityOfDewPointPct(dryBulbC, dewPointC, 'ice'));
  }
  return sums;
}
