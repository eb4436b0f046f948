/** Random weights of a ranking (method 7.8), each draw written into a column that is used again. */

/** How weights are drawn: around those of the brief, or any at all. */
export type WeightView = 'near the brief' | 'any weights';

const LEAST_FACTOR = 0.75;
const FACTOR_WIDTH = 0.5;

/** A function that writes the next draw; the weights of a draw sum to 1. */
export function weightDraws(input: {
  view: WeightView;
  weights: readonly number[];
  random: () => number;
}): (into: Float64Array) => void {
  const { view, weights, random } = input;
  const drawOne = view === 'near the brief' ? nearBrief(weights, random) : () => exponential(random);
  return (into) => {
    let sum = 0;
    for (let criterion = 0; criterion < weights.length; criterion++) {
      const drawn = drawOne(criterion);
      into[criterion] = drawn;
      sum += drawn;
    }
    for (let criterion = 0; criterion < weights.length; criterion++) into[criterion] = (into[criterion] ?? 0) / sum;
  };
}

/** The brief's weight x U(0.75, 1.25). */
function nearBrief(weights: readonly number[], random: () => number): (criterion: number) => number {
  return (criterion) => (weights[criterion] ?? 0) * (LEAST_FACTOR + FACTOR_WIDTH * random());
}

/** Normalised exponentials are uniform on the simplex (Tervonen and Lahdelma, Eur. J. Oper. Res. 178(2), 2007). */
function exponential(random: () => number): number {
  return -Math.log(1 - random());
}
