import type { ScorePart } from '../run/run-result.ts';
import type { RawComponents } from './weighted-score.ts';

/** The raw components that a score was formed of. */
export function rawOfParts(parts: readonly ScorePart[]): RawComponents {
  const of = (component: keyof RawComponents): number | null =>
    parts.find((part) => part.component === component)?.raw ?? null;
  return {
    served: of('served'),
    severity: of('severity'),
    spell: of('spell'),
    damp: of('damp'),
    water: of('water'),
    electricity: of('electricity'),
    'worst-year': of('worst-year'),
  };
}
