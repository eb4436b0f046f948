import * as z from 'zod/mini';
import { endpoint, json } from './endpoint.ts';
import { Ledger, ProgrammeParams, Verdict } from './runs.ts';

/** A station under a draft brief; its figures are a place's, its ledger that of the year that stands for it. */
export const RescoredStation = z.object({
  stationId: z.uuid(),
  score: z.nullable(z.int()),
  /** Why `score` is null. */
  scoreNote: z.nullable(z.string()),
  words: z.nullable(z.string()),
  verdict: z.nullable(Verdict),
  yearsMeeting: z.int(),
  range: z.nullable(z.object({ low: z.int(), high: z.int() })),
  /** null without a usable year. */
  ledger: z.nullable(Ledger),
  shownWeatherYearId: z.nullable(z.uuid()),
  /** The weather years that the figures rest on. */
  restsOn: z.array(z.uuid()),
});
export type RescoredStation = z.infer<typeof RescoredStation>;

export const RescoreAnswer = z.object({
  methodVersion: z.string(),
  stations: z.array(RescoredStation),
  /** Every weather year that was judged, in the order of the map. */
  judged: z.array(
    z.object({
      weatherYearId: z.uuid(),
      stationId: z.uuid(),
      kind: z.enum(['typical', 'actual', 'derived']),
      year: z.nullable(z.int()),
      contentHash: z.string(),
      /** SHA-256 of the whole result, the one that a saved run carries; null unless asked for. */
      resultHash: z.nullable(z.string()),
    }),
  ),
  /** Of the answer, and of it the fetching of weather that was not in memory, ms. */
  totalMs: z.number(),
  loadMs: z.number(),
});
export type RescoreAnswer = z.infer<typeof RescoreAnswer>;

/** As many as a view holds. */
const MOST_STATIONS_NAMED = 2000;

export const rescore = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/rescore',
  summary: 'Judge every usable weather year of the team, or of some stations, by a draft brief. Nothing is stored.',
  params: ProgrammeParams,
  query: z.strictObject({ hashes: z.optional(z.literal('yes')) }),
  body: json(
    z.strictObject({
      /** The draft; the engine reads it whole and answers every fault at once, each at its path. */
      body: z.record(z.string(), z.unknown()),
      /** Left out: every station. */
      stationIds: z.optional(z.array(z.uuid()).check(z.minLength(1), z.maxLength(MOST_STATIONS_NAMED))),
    }),
  ),
  response: json(RescoreAnswer),
  errors: [],
  allow: 'runs.view',
  limits: { bodyBytes: 192 * 1024, perMinute: 600, seconds: 60 },
});
