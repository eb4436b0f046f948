import type { PlaceFigures, PlaceRun } from '../score/place-figures.ts';
import type { RangeDoubt, ScoreRange } from '../score/score-range.ts';

/** Normalised components, 0..100, in the order of the brief's score; null where one does not apply. */
export type Criteria = readonly (number | null)[];

/** What one doubt of method 7.6 does to each criterion at its two ends. */
export interface CriteriaDoubt {
  readonly doubt: RangeDoubt;
  readonly minus: readonly number[];
  readonly plus: readonly number[];
}

/** A place as it goes into a ranking. */
export interface PlaceToRank {
  readonly id: string;
  /** What the place's score is made of. */
  readonly criteria: Criteria;
  /** The same of each year that the score rests on; fewer than two are no doubt. */
  readonly years: readonly Criteria[];
  readonly doubts: readonly CriteriaDoubt[];
}

/**
 * A place from its figures and, where it has been judged, the range of the year that stands for it. Places without a
 * score and places of grade D are not ranked (method 7.7): leave them out.
 */
export function placeToRank<Run extends PlaceRun>(input: {
  id: string;
  figures: Pick<PlaceFigures<Run>, 'parts' | 'runs'>;
  range: ScoreRange | null;
}): PlaceToRank {
  const { id, figures, range } = input;
  return {
    id,
    criteria: figures.parts.map(({ normalised }) => normalised),
    years: figures.runs.map(({ result }) => result.parts.map(({ normalised }) => normalised)),
    doubts: (range?.pairs ?? []).map(({ doubt, minus, plus }) => ({
      doubt,
      minus: changes(minus.normalised, range?.normalised ?? []),
      plus: changes(plus.normalised, range?.normalised ?? []),
    })),
  };
}

/** What applies at one side alone has no change that could be counted. */
function changes(end: Criteria, asJudged: Criteria): readonly number[] {
  return end.map((value, criterion) => {
    const from = asJudged[criterion] ?? null;
    return value === null || from === null ? 0 : value - from;
  });
}
