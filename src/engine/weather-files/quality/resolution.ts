import { MISSING_INT16 } from '../../conventions.ts';

/** The grain of a column of temperatures, 0.01 K. */
export interface Resolution {
  /** The coarsest of 1, 0.5 and 0.1 K on which 95 % of the values lie, else 0.1 K. */
  readonly usual: 100 | 50 | 10;
  /** The coarsest of the three on which all of them lie, else 0.1 K: what the file rounds to. */
  readonly finest: 100 | 50 | 10;
}

const NEARLY_ALL = 0.95;

/** Grain of a column in hundredths; the choice of grains and the share are those of HadISD's persistence tests. */
export function resolutionOf(values: Int16Array): Resolution {
  let present = 0;
  let whole = 0;
  let half = 0;
  for (let step = 0; step < values.length; step++) {
    const value = values[step] ?? MISSING_INT16;
    if (value === MISSING_INT16) continue;
    present++;
    if (value % 50 !== 0) continue;
    half++;
    if (value % 100 === 0) whole++;
  }
  const grain = (share: number) => (whole >= share * present ? 100 : half >= share * present ? 50 : 10);
  return { usual: grain(NEARLY_ALL), finest: grain(1) };
}
