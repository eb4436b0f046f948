/**
 * How little a weight has to change before two neighbours of a ranking change places: one weight moves, the others keep
 * their proportions (one-way sensitivity of a weighted sum).
 */
import type { Criteria } from './place-to-rank.ts';

export interface WeightSwap {
  /** Place of the criterion in the brief's score, 0 first. */
  readonly criterion: number;
  /** Its weight, of 100, now and where the two tie. */
  readonly fromWeight: number;
  readonly toWeight: number;
}

/**
 * The least change of one weight at which the two tie.
 * @param input.weights the brief's weights, any scale
 * @returns null when no weight between 0 and 100 makes them tie
 */
export function leastWeightSwap(input: {
  weights: readonly number[];
  ahead: Criteria;
  behind: Criteria;
}): WeightSwap | null {
  const { weights, ahead, behind } = input;
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  let least: WeightSwap | null = null;
  for (const [criterion, weight] of weights.entries()) {
    const share = weight / total;
    // Where the others have no weight there are no proportions to keep.
    if (share >= 1) continue;
    const shares = weights.map((each) => each / total);
    for (const tie of tiesOf(lineOf(ahead, shares, criterion), lineOf(behind, shares, criterion))) {
      const found = { criterion, fromWeight: 100 * share, toWeight: 100 * tie };
      if (least === null || changeOf(found) < changeOf(least)) least = found;
    }
  }
  return least;
}

function changeOf({ fromWeight, toWeight }: WeightSwap): number {
  return Math.abs(toWeight - fromWeight);
}

/** A weighted sum and the weight of what applies, both straight lines in the share x of one criterion: at0 + slope x. */
interface Line {
  readonly sumAt0: number;
  readonly sumSlope: number;
  readonly weightAt0: number;
  readonly weightSlope: number;
}

function lineOf(criteria: Criteria, shares: readonly number[], moved: number): Line {
  let sumAt0 = 0;
  let weightAt0 = 0;
  for (const [criterion, share] of shares.entries()) {
    const value = criteria[criterion] ?? null;
    if (criterion === moved || value === null) continue;
    sumAt0 += (share * value) / (1 - (shares[moved] ?? 0));
    weightAt0 += share / (1 - (shares[moved] ?? 0));
  }
  const value = criteria[moved] ?? null;
  return { sumAt0, sumSlope: (value ?? 0) - sumAt0, weightAt0, weightSlope: (value === null ? 0 : 1) - weightAt0 };
}

/** Shares in 0..1 at which sum / weight of both is the same: roots of one quadratic, a straight line where all apply. */
function tiesOf(one: Line, other: Line): readonly number[] {
  const square = one.sumSlope * other.weightSlope - other.sumSlope * one.weightSlope;
  const slope =
    one.sumAt0 * other.weightSlope +
    one.sumSlope * other.weightAt0 -
    other.sumAt0 * one.weightSlope -
    other.sumSlope * one.weightAt0;
  const at0 = one.sumAt0 * other.weightAt0 - other.sumAt0 * one.weightAt0;
  return rootsOf({ square, slope, at0 }).filter((share) => share >= 0 && share <= 1);
}

const NO_SLOPE = 1e-9;

function rootsOf({ square, slope, at0 }: { square: number; slope: number; at0: number }): readonly number[] {
  if (Math.abs(square) < NO_SLOPE) return Math.abs(slope) < NO_SLOPE ? [] : [-at0 / slope];
  const inside = slope * slope - 4 * square * at0;
  if (inside < 0) return [];
  // Without subtracting nearly equal numbers (Press et al., Numerical Recipes, 5.6).
  const half = -(slope + (slope < 0 ? -1 : 1) * Math.sqrt(inside)) / 2;
  return half === 0 ? [0] : [half / square, at0 / half];
}
