import type { PlaceFigures } from '../../src/contract/place-figures.ts';

/** What a list tells of a place beside score, verdict and grade. */
export const yearFigures: Omit<PlaceFigures, 'score' | 'scoreNote' | 'verdict' | 'grade'> = {
  words: null,
  yearsMeeting: 0,
  yearsCounted: 1,
  range: null,
  ledger: { classes: [6000, 0, 760, 0, 100, 500, 800, 0, 0, 0, 400, 200], demand: 2000, met: 1300 },
  litresPerKwh: 1.4,
  savedPct: 41.5,
  worstSpellHours: 12,
  severityKh: 340.25,
};
