import * as z from 'zod/mini';
import { Grade, Verdict } from './runs.ts';

/** Hours of the year that stands for a place. */
export const ClassHours = z.object({
  /** Hours of each class, in the order of `HourClass`; they add up to the hours of the year. */
  classes: z.array(z.int()),
  demand: z.int(),
  met: z.int(),
});
export type ClassHours = z.infer<typeof ClassHours>;

/**
 * What a station or site comes to under a brief: the same figures on the map and in answer to a draft. Score, verdict and range are the
 * place's; hours, water, electricity, spell and severity are those of the one year that stands for it.
 */
export const PlaceFigures = z.object({
  /** null: not judged yet, excluded by a gate, or no demand; `scoreNote` says which. */
  score: z.nullable(z.int()),
  scoreNote: z.nullable(z.string()),
  words: z.nullable(z.string()),
  verdict: z.nullable(Verdict),
  /** Years that meet the brief, of those that the figures rest on. */
  yearsMeeting: z.int(),
  yearsCounted: z.int(),
  /** Least and greatest score over the years. */
  range: z.nullable(z.object({ low: z.int(), high: z.int() })),
  /** null without a usable year. */
  ledger: z.nullable(ClassHours),
  /** Make-up water, L per kWh of cooling, to 0.001. */
  litresPerKwh: z.nullable(z.number()),
  /** Electricity saved against the reference, %, to 0.01; null where not applicable. */
  savedPct: z.nullable(z.number()),
  worstSpellHours: z.nullable(z.int()),
  /** K h, under an index limit point h, to 0.01. */
  severityKh: z.nullable(z.number()),
  grade: Grade,
});
export type PlaceFigures = z.infer<typeof PlaceFigures>;
