/** The grain of a column of temperatures, 0.01 K. */
export interface Resolution {
  /** The coarsest of 1, 0.5 and 0.1 K on which 95 % of the values lie, else 0.1 K. */
  readonly usual: 100 | 50 | 10;
  /** The coarsest of the three on which all of them lie, else 0.1 K: what the file rounds to. */
  readonly finest: 100 | 50 | 10;
}

const NEARLY_ALL = 0.95;

/**
 * Grain of a column from the number of its values, of those on halves and of those on whole degrees; the choice of grains is that
 * of HadISD's persistence tests.
 */
export function resolutionOf(values: { present: number; half: number; whole: number }): Resolution {
  const { half, present, whole } = values;
  const grain = (share: number) => (whole >= share * present ? 100 : half >= share * present ? 50 : 10);
  return { usual: grain(NEARLY_ALL), finest: grain(1) };
}
