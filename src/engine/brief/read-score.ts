import type { ScoreAnchor } from './brief.ts';
import type { Fields } from './fields.ts';
import { defaultScore } from './score-defaults.ts';

const COMPONENTS = ['served', 'severity', 'spell', 'damp', 'water', 'electricity', 'worst-year'] as const;
const ANCHOR = { min: -1e6, max: 1e6 };
/** Weights are typed with a few decimals; their sum is compared to this. */
const WEIGHT_ROUNDING = 1e-6;

/** Components, weights and anchors of a brief; those of method 7.3 when it names none. */
export function readScore(fields: Fields): readonly ScoreAnchor[] {
  if (!fields.has('score')) return defaultScore;
  const score = fields.list('score', (entry, path) => readAnchor(fields.entry(entry, path)));
  const named = score.map(({ component }) => component);
  if (new Set(named).size !== named.length) fields.fault('score', 'each component stands once');
  const sum = score.reduce((total, { weight }) => total + weight, 0);
  if (Math.abs(sum - 100) > WEIGHT_ROUNDING) {
    fields.fault('score', `the weights must add up to 100, not ${Math.round(sum * 1e6) / 1e6}`);
  }
  return score;
}

function readAnchor(entry: Fields): ScoreAnchor {
  if (!entry.has('component')) entry.fault('component', `one of ${COMPONENTS.join(', ')} is needed`);
  const read = {
    component: entry.choice('component', COMPONENTS),
    weight: entry.number('weight', { min: 0, max: 100 }),
    a0: entry.number('a0', ANCHOR),
    a100: entry.number('a100', ANCHOR),
  };
  if (read.a0 === read.a100) entry.fault('a100', 'the two anchors must differ');
  entry.refuseOthers();
  return read;
}
