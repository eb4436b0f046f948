import type { ScoreAnchor } from './brief.ts';

/** Components, weights and anchors of method 7.3: a policy choice of ours that the client accepts or changes. */
export const defaultScore: readonly ScoreAnchor[] = [
  { component: 'served', weight: 30, a0: 70, a100: 99 },
  { component: 'severity', weight: 10, a0: 300, a100: 0 },
  { component: 'spell', weight: 10, a0: 240, a100: 0 },
  { component: 'damp', weight: 10, a0: 40, a100: 0 },
  { component: 'water', weight: 15, a0: 5, a100: 0.5 },
  { component: 'electricity', weight: 15, a0: 0, a100: 60 },
  { component: 'worst-year', weight: 10, a0: 70, a100: 99 },
];
