/** Checks over many states: the states, drawn from a fixed seed, and the answer that the worst of them gives. */
import { seededRandom } from '../ranking/seeded-random.ts';
import { printed } from './check-answer.ts';
import type { CheckAnswer } from './published-check.ts';

const SEED = 20_260;

export interface RandomAir {
  readonly dryBulbC: number;
  readonly relativeHumidityPct: number;
  readonly pressurePa: number;
}

/** States of -40 to 55 °C and 1 to 100 %, always the same ones. */
export function randomAir(asked: { states: number; pressurePa: { low: number; high: number } }): readonly RandomAir[] {
  const draw = seededRandom(SEED, 'checks of moist air');
  const { low, high } = asked.pressurePa;
  return Array.from({ length: asked.states }, () => ({
    dryBulbC: -40 + 95 * draw(),
    relativeHumidityPct: 1 + 99 * draw(),
    pressurePa: low + (high - low) * draw(),
  }));
}

/** The largest difference of many must not pass a bound; no difference at all is no proof. */
export function mostOver(many: {
  input: string;
  expected: string;
  differences: readonly number[];
  most: number;
  tag: string;
  unit: string;
}): CheckAnswer {
  const worst = many.differences.reduce((most, each) => Math.max(most, each), 0);
  return {
    input: many.input,
    expected: many.expected,
    tolerance: `at most ${many.most} ${many.unit} off`,
    found: `at most ${printed(worst)} ${many.unit} off`,
    holds: many.differences.length > 0 && worst <= many.most,
    tag: many.tag,
  };
}
