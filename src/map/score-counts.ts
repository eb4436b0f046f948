import type { MapStation } from '../contract/programme-map.ts';

/** Class limits of the score, in points; a class holds its lower limit, the last one both. */
export const SCORE_LIMITS = [0, 20, 40, 60, 80, 100] as const;

export type ScoreCounts = {
  /** Stations in each class, as many as there are limits but one. */
  readonly classes: readonly number[];
  readonly noScore: number;
  readonly gradeD: number;
};

/** How many stations fall in each class of the score, how many have none and how many are of grade D. */
export function scoreCounts(stations: readonly Pick<MapStation, 'score' | 'grade'>[]): ScoreCounts {
  const classes = SCORE_LIMITS.slice(1).map(() => 0);
  for (const { score } of stations) {
    if (score === null) continue;
    const index = Math.min(
      classes.length - 1,
      SCORE_LIMITS.findLastIndex((limit) => limit <= score),
    );
    classes[index] = (classes[index] ?? 0) + 1;
  }
  return {
    classes,
    noScore: stations.filter((station) => station.score === null).length,
    gradeD: stations.filter((station) => station.grade === 'D').length,
  };
}
