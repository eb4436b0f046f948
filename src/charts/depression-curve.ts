/** The cumulative curve of depression: hours of a year at or above each depression, counted as the record counts them. */
import { reachedHundredths } from '../engine/reduction/derived-columns.ts';

export interface CurvePoint {
  readonly atLeastK: number;
  readonly hours: number;
}

const STEP_HUNDREDTHS = 10;

/**
 * Hours at or above 0, 0.1, 0.2 .. K up to the first depression that no hour reaches.
 * @param depressionK depression of every slot, K, NaN where not known
 */
export function depressionCurve(depressionK: Float64Array): readonly CurvePoint[] {
  const counts: number[] = [];
  for (const hundredths of reachedHundredths(depressionK)) {
    if (hundredths < 0) continue;
    const step = Math.floor(hundredths / STEP_HUNDREDTHS);
    counts[step] = (counts[step] ?? 0) + 1;
  }
  const points: CurvePoint[] = [{ atLeastK: counts.length / 10, hours: 0 }];
  let above = 0;
  for (let step = counts.length - 1; step >= 0; step -= 1) {
    above += counts[step] ?? 0;
    points.push({ atLeastK: step / 10, hours: above });
  }
  return points.reverse();
}

/** The curve of a year that is told in whole kelvin alone: from the hours that are known to the first depression that none reaches. */
export function countedCurve(knownHours: number, counts: readonly CurvePoint[]): readonly CurvePoint[] {
  const end = counts.findIndex(({ hours }) => hours === 0);
  return [{ atLeastK: 0, hours: knownHours }, ...(end === -1 ? counts : counts.slice(0, end + 1))];
}

/** Hours at or above a depression, K, off a curve of whole tenths; 0 beyond its end. */
export function hoursAtOrAbove(curve: readonly CurvePoint[], atLeastK: number): number {
  return curve[Math.max(0, Math.ceil(Math.round(atLeastK * 100) / 10))]?.hours ?? 0;
}
