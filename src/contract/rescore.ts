import * as z from 'zod/mini';
import { endpoint, json } from './endpoint.ts';
import { PlaceFigures } from './place-figures.ts';
import { ProgrammeParams } from './runs.ts';

/** A station under a draft brief; its hours are those of the year that stands for it. */
export const RescoredStation = z.extend(PlaceFigures, {
  stationId: z.uuid(),
  shownWeatherYearId: z.nullable(z.uuid()),
  /** The weather years that the figures rest on. */
  restsOn: z.array(z.uuid()),
});
export type RescoredStation = z.infer<typeof RescoredStation>;

/** A site under a draft brief, with its own height and gates. */
export const RescoredSite = z.extend(PlaceFigures, { siteId: z.uuid() });
export type RescoredSite = z.infer<typeof RescoredSite>;

export const RescoreAnswer = z.object({
  methodVersion: z.string(),
  stations: z.array(RescoredStation),
  /** The sites that were asked for, in the order of the map; one that has gone is left out. */
  sites: z.array(RescoredSite),
  /** Every weather year of those stations that was judged, in the order of the map. */
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
const MOST_NAMED = 2000;

export const rescore = endpoint({
  method: 'POST',
  path: '/api/teams/:teamId/programmes/:programmeId/rescore',
  summary: 'Judge the stations of the team, or some of them, and some sites by a draft brief. Nothing is stored.',
  params: ProgrammeParams,
  query: z.strictObject({ hashes: z.optional(z.literal('yes')) }),
  body: json(
    z.strictObject({
      /** The draft; the engine reads it whole and answers every fault at once, each at its path. */
      body: z.record(z.string(), z.unknown()),
      /** Left out: every station. */
      stationIds: z.optional(z.array(z.uuid()).check(z.maxLength(MOST_NAMED))),
      /** Sites of the programme, those in view; left out: none. */
      siteIds: z.optional(z.array(z.uuid()).check(z.maxLength(MOST_NAMED))),
    }),
  ),
  response: json(RescoreAnswer),
  errors: [],
  allow: 'runs.view',
  limits: { bodyBytes: 192 * 1024, perMinute: 600, seconds: 60 },
});
