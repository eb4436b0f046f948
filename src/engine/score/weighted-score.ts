import type { ScoreAnchor, ScoreComponent } from '../brief/brief.ts';
import type { ScorePart } from '../run/run-result.ts';

/** The raw figure of each component; null where it has no meaning or no denominator. */
export type RawComponents = Readonly<Record<ScoreComponent, number | null>>;

export interface WeightedScore {
  /** null when no component applies. */
  readonly scoreExact: number | null;
  readonly geometricMean: number | null;
  readonly parts: readonly ScorePart[];
}

const NAMES: Readonly<Record<ScoreComponent, { label: string; unit: string }>> = {
  served: { label: 'Demand hours served', unit: '%' },
  severity: { label: 'Severity', unit: 'K h per 1000 demand hours' },
  spell: { label: 'Worst spell', unit: 'h' },
  damp: { label: 'Demand hours too damp', unit: '%' },
  water: { label: 'Make-up water', unit: 'L/kWh' },
  electricity: { label: 'Electricity saved', unit: '%' },
  'worst-year': { label: 'Demand hours served, worst year', unit: '%' },
};

/** The name of a component as every screen writes it. */
export function componentLabel(component: ScoreComponent): string {
  return NAMES[component].label;
}

/** A factor of 0 would hide every other in the geometric mean (method 7.4). */
const LEAST_FACTOR = 1;

/**
 * The score by fixed anchors (method 7.3 and 7.4): s = clamp(100 (x - a0) / (a100 - a0)), points = s x weight / 100; the
 * weight of a component that does not apply is shared over the others in proportion.
 * @param indexPoints severity is counted in index points, not in kelvin
 */
export function weightedScore(
  anchors: readonly ScoreAnchor[],
  raw: RawComponents,
  options: { indexPoints: boolean },
): WeightedScore {
  const applying = anchors.filter(({ component }) => raw[component] !== null);
  const total = applying.reduce((sum, { weight }) => sum + weight, 0);
  const parts = anchors.map((anchor) => partOf(anchor, { raw: raw[anchor.component], total, ...options }));
  if (total <= 0) return { scoreExact: null, geometricMean: null, parts };
  const scoreExact = parts.reduce((sum, part) => sum + (part.points ?? 0), 0);
  const logs = parts.map(({ normalised, weight }) => weight * Math.log(Math.max(normalised ?? 1, LEAST_FACTOR)));
  const geometricMean = Math.exp(logs.reduce((sum, log) => sum + log, 0) / 100);
  return { scoreExact, geometricMean, parts };
}

function partOf(anchor: ScoreAnchor, input: { raw: number | null; total: number; indexPoints: boolean }): ScorePart {
  const { component, a0, a100 } = anchor;
  const { label, unit } = NAMES[component];
  const { raw, total } = input;
  const applies = raw !== null && total > 0;
  const normalised = applies ? Math.min(Math.max((100 * (raw - a0)) / (a100 - a0), 0), 100) : null;
  const weight = applies ? (100 * anchor.weight) / total : 0;
  return {
    component,
    label,
    unit: input.indexPoints ? unit.replace('K h', 'point h') : unit,
    a0,
    a100,
    raw,
    normalised,
    weight,
    points: normalised === null ? null : (normalised * weight) / 100,
  };
}

/** The band of a printed score in a word (method 7.4): "most", "much", "some" or "little" of the demand. */
export function bandWord(score: number): string {
  if (score >= 80) return 'most';
  if (score >= 60) return 'much';
  return score >= 40 ? 'some' : 'little';
}
